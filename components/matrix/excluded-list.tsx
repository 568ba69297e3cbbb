import type { ExcludedPoint } from "@/lib/schemas/plan";
import { placeWords } from "./cell-words";

/** The cells that are not run, by their reason: what the hatched cells say to a resting pointer, for everybody. */
export function ExcludedList({ excluded }: { excluded: readonly ExcludedPoint[] }) {
  if (excluded.length === 0) return null;
  const reasons = [...new Set(excluded.map((cell) => cell.reason))];
  return (
    <details className="px-1 pt-2 text-small">
      <summary className="w-max text-water">
        {excluded.length === 1 ? "1 cell is not run" : `${excluded.length} cells are not run`}
      </summary>
      <dl className="mt-1 grid gap-1">
        {reasons.map((reason) => (
          <div key={reason}>
            <dt className="font-semibold">{reason}</dt>
            <dd className="text-ink-2">
              {excluded
                .filter((cell) => cell.reason === reason)
                .map(placeWords)
                .join("; ")}
            </dd>
          </div>
        ))}
      </dl>
    </details>
  );
}
