/** Standard error numbers that the simulated devices report (SCPI-1999, volume 2, chapter 21; from memory). */
export const SCPI_ERRORS = {
  missingParameter: [-109, "Missing parameter"],
  undefinedHeader: [-113, "Undefined header"],
  settingsConflict: [-221, "Settings conflict"],
  dataOutOfRange: [-222, "Data out of range"],
  illegalParameter: [-224, "Illegal parameter value"],
  hardwareError: [-240, "Hardware error"],
  queueOverflow: [-350, "Queue overflow"],
} as const satisfies Record<string, readonly [number, string]>;

export type ScpiErrorName = keyof typeof SCPI_ERRORS;

/** An error that a command leaves in the device's queue. */
export class ScpiFault extends Error {
  override readonly name = "ScpiFault";
  constructor(readonly error: ScpiErrorName) {
    super(SCPI_ERRORS[error][1]);
  }
}

/** Not a number and infinity as numbers (SCPI-1999, volume 1, 7.2.1; from memory). */
export const OVER_RANGE = "9.90000E+37";

/**
 * A matcher for one header such as `SOURce:VOLTage[:LEVel]`: long and short forms, optional nodes, any case.
 * Capital letters are the short form.
 */
export function headerPattern(header: string): RegExp {
  const isQuery = header.endsWith("?");
  const body = isQuery ? header.slice(0, -1) : header;
  const nodes = body
    .split(/(?=\[)|(?<=\])/u)
    .flatMap((part) => (part.startsWith("[") ? [part] : part.split(":").filter(Boolean)));
  const source = nodes
    .map((node) => {
      const isOptional = node.startsWith("[");
      const pattern = mnemonic(node.replace(/[[\]:]/gu, ""));
      return isOptional ? `(?::?${pattern})?` : `:?${pattern}`;
    })
    .join("");
  return new RegExp(`^${source}${isQuery ? "\\?" : ""}$`, "iu");
}

function mnemonic(node: string): string {
  const short = /^[A-Z0-9]+/u.exec(node)?.[0] ?? node;
  return short.length === node.length ? node : `${short}(?:${node.slice(short.length)})?`;
}

const SUFFIX_POWERS: Readonly<Record<string, number>> = { "": 0, U: -6, M: -3, K: 3, MA: 6, G: 9 };

/**
 * A decimal number with an optional suffix in `unit`. M is milli and MA mega, except that MOHM means megaohm
 * (IEEE 488.2, 7.7.3; from memory). Throws ScpiFault.
 */
export function parseNumber(text: string | undefined, unit: string): number {
  if (text === undefined || text === "") throw new ScpiFault("missingParameter");
  const match = /^([+-]?(?:\d+\.?\d*|\.\d+)(?:E[+-]?\d+)?)\s*([A-Z]*)$/iu.exec(text.trim());
  if (!match) throw new ScpiFault("illegalParameter");
  const suffix = match[2]!.toUpperCase();
  if (suffix === "MOHM" && unit === "OHM") return Number(match[1]) * 1e6;
  const prefix = suffix.endsWith(unit) ? suffix.slice(0, -unit.length) : suffix === "" ? "" : null;
  const power = prefix === null ? undefined : SUFFIX_POWERS[prefix];
  if (power === undefined) throw new ScpiFault("illegalParameter");
  return Number(match[1]) * 10 ** power;
}

/** ON, OFF, 1 or 0. Throws ScpiFault. */
export function parseBoolean(text: string | undefined): boolean {
  if (text === undefined || text === "") throw new ScpiFault("missingParameter");
  if (/^(ON|1)$/iu.test(text.trim())) return true;
  if (/^(OFF|0)$/iu.test(text.trim())) return false;
  throw new ScpiFault("illegalParameter");
}
