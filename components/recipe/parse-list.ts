import { splitList, type Parsed } from "@/lib/units/parse";

export interface ParsedList<T extends number> {
  /** Rising, each value once. */
  values: T[];
  /** How many entries stood there more than once. */
  repeated: number;
  /** One message for each entry that is no value. */
  problems: string[];
}

/** Reads a typed or pasted list; a part that is no value by itself may still be a run of values with bare commas. */
export function parseList<T extends number>(text: string, parse: (part: string) => Parsed<T>): ParsedList<T> {
  const outcomes = splitList(text).flatMap((part) => parsePart(part, parse));
  const values = outcomes.flatMap((outcome) => (outcome.ok ? [outcome.value] : []));
  const once = [...new Set(values)].sort((a, b) => a - b);
  return {
    values: once,
    repeated: values.length - once.length,
    problems: outcomes.flatMap((outcome) => (outcome.ok ? [] : [outcome.message])),
  };
}

function parsePart<T>(part: string, parse: (part: string) => Parsed<T>): Parsed<T>[] {
  const whole = parse(part);
  if (whole.ok || !part.includes(",")) return [whole];
  const pieces = part
    .split(",")
    .filter((piece) => piece.trim() !== "")
    .map(parse);
  return pieces.every(({ ok }) => ok) ? pieces : [whole];
}
