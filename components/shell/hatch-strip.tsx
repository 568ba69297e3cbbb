import type { OutputState } from "@/lib/schemas/bench";
import { formatTerminalVolts } from "@/lib/units/format";

export interface HatchStripProps {
  output: OutputState;
  /** Name of the bench whose terminals are meant. */
  benchName: string;
  /** `edge` is the narrow band of a phone, whose words stand elsewhere on the page. */
  size?: "strip" | "edge";
}

/** A hazardous voltage may be present: only then, and always with the words. Nothing while the output is off. */
export function HatchStrip({ output, benchName, size = "strip" }: HatchStripProps) {
  if (output.state === "off") return null;
  const [lead, rest] = outputWords(output, benchName);
  if (size === "edge") {
    return (
      <div className="hatch h-2.5">
        <span className="sr-only">{`${lead}${rest}`}</span>
      </div>
    );
  }
  return (
    <div role="status" className="hatch flex min-h-7.5 items-center px-4 sm:px-6">
      <p className="bg-hatch-ink px-3.5 py-1 leading-5.5 font-bold tracking-[0.02em] text-amber-text">
        {lead}
        <span className="max-sm:block sm:ml-3">{rest}</span>
      </p>
    </div>
  );
}

/** The state of the output in words; unknown counts as dangerous. */
export function outputWords(output: OutputState, benchName: string): [lead: string, rest: string] {
  if (output.state === "unknown") return ["OUTPUT UNKNOWN:", ` treat the terminals of ${benchName} as live`];
  const voltage = output.volts === null ? "voltage" : formatTerminalVolts(output.volts);
  return ["OUTPUT ON", ` ${voltage} at the terminals of ${benchName}`];
}
