import { Panel } from "@/components/ui/panel";
import type { ExcludedPoint } from "@/lib/schemas/plan";
import { formatOhms, formatTestVolts } from "@/lib/units/format";

/** Cells of the recipe that were not run, by reason. Nothing when all were. */
export function ExcludedPanel({ excluded }: { excluded: readonly ExcludedPoint[] }) {
  if (excluded.length === 0) return null;
  const reasons = [...new Set(excluded.map(({ reason }) => reason))];
  return (
    <Panel title="Not run" right={excluded.length === 1 ? "1 cell" : `${excluded.length} cells`}>
      <dl className="grid gap-2 text-small">
        {reasons.map((reason) => (
          <div key={reason}>
            <dt className="font-semibold">{reason}</dt>
            <dd className="text-ink-2">{placesWords(excluded.filter((cell) => cell.reason === reason))}</dd>
          </div>
        ))}
      </dl>
    </Panel>
  );
}

/** `50.00 GΩ and 90.00 GΩ at 50 V; 90.00 GΩ at 100 V`. */
function placesWords(cells: readonly ExcludedPoint[]): string {
  const voltages = [...new Set(cells.map(({ testVolts }) => testVolts))];
  return voltages
    .map((volts) => {
      const ohms = cells
        .filter(({ testVolts }) => testVolts === volts)
        .map(({ nominalOhms }) => formatOhms(nominalOhms));
      const list = ohms.length > 1 ? `${ohms.slice(0, -1).join(", ")} and ${ohms.at(-1)}` : ohms[0];
      return `${list} at ${formatTestVolts(volts)}`;
    })
    .join("; ");
}
