import { Panel } from "@/components/ui/panel";
import type { ExcludedPoint, Plan } from "@/lib/schemas/plan";
import { formatOhms, formatTestVolts, THIN_SPACE } from "@/lib/units/format";

/** Cells of the recipe that were not run, by reason. Nothing when all were. */
export function ExcludedPanel({ plan }: { plan: Plan }) {
  const { excluded } = plan;
  if (excluded.length === 0) return null;
  const reasons = [...new Set(excluded.map(({ reason }) => reason))];
  return (
    <Panel title="Not run" right={excluded.length === 1 ? "1 cell" : `${excluded.length} cells`}>
      <dl className="grid gap-2 text-small">
        {reasons.map((reason) => (
          <div key={reason}>
            <dt className="font-semibold">{reason.charAt(0).toUpperCase() + reason.slice(1)}</dt>
            <dd className="text-ink-2">
              {placesWords(
                excluded.filter((cell) => cell.reason === reason),
                plan,
              )}
            </dd>
          </div>
        ))}
      </dl>
    </Panel>
  );
}

/** `50.00 GΩ and 90.00 GΩ at 50 V; all resistances at 100 V`. */
function placesWords(cells: readonly ExcludedPoint[], plan: Plan): string {
  const voltages = [...new Set(cells.map(({ testVolts }) => testVolts))];
  const all = new Set([...plan.points, ...plan.excluded].map(({ nominalOhms }) => nominalOhms)).size;
  return voltages
    .map((volts) => {
      const ohms = [...new Set(cells.filter((cell) => cell.testVolts === volts).map((cell) => cell.nominalOhms))];
      const names =
        ohms.length === all && all > 1 ? "all resistances" : listWords(ohms.map((each) => formatOhms(each)));
      return unbroken(`${names} at ${formatTestVolts(volts)}`);
    })
    .join("; ");
}

function listWords(words: readonly string[]): string {
  return words.length > 1 ? `${words.slice(0, -1).join(", ")} and ${words.at(-1)}` : (words[0] ?? "");
}

/** In running text a number and its unit stay on one line (U+202F, the thin space that does not break). */
function unbroken(text: string): string {
  return text.replaceAll(THIN_SPACE, "\u202f");
}
