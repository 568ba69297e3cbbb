import { digitsFor, engineeringParts } from "@/lib/units/format";

export interface IndicationProps {
  /** Null when nothing is displayed, or over range. */
  ohms: number | null;
  overRange?: boolean;
  /** Least step of the display here. */
  resolutionOhms?: number;
}

/** What the unit under test displays at this moment, legible from two metres. Its place keeps its width. */
export function Indication({ ohms, overRange = false, resolutionOhms }: IndicationProps) {
  const parts =
    ohms === null
      ? { number: overRange ? "over" : "–", unit: overRange ? "range" : "" }
      : engineeringParts(ohms, "Ω", { digits: digitsFor(ohms, resolutionOhms) });
  return (
    <div>
      <p className="text-label text-ink-2">Indication</p>
      <p className="min-w-[5.2ch] font-mono text-indication font-semibold tracking-[-0.03em] whitespace-nowrap tabular">
        {parts.number}
        <small className="ml-2 text-[1.625rem] font-medium tracking-normal text-ink-2">{parts.unit}</small>
      </p>
    </div>
  );
}
