import type { Judgement } from "@/lib/schemas/run-event";
import { classNames } from "@/components/ui/class-names";
import { VERDICT_INKS, type PointVerdict } from "./verdict";

export interface SliverProps {
  errorOhms: number | null;
  /** Half-width of the tolerance band; the mark stays empty without one. */
  limitOhms: number | null;
  /** Expanded uncertainty; no line is drawn without it. */
  uncertaintyOhms?: number | null;
  verdict: PointVerdict;
  className?: string;
}

/** Drawing units: a band of 36 from x = 10 to 46 with room for an arrowhead on each side. */
const CENTRE = 28;
const HALF_BAND = 18;
/** An error beyond this share of the limit leaves the drawing: an arrowhead stands for it. */
const FARTHEST = 1.2;

/**
 * The tolerance band as a small outlined bar, a tick at the error, a line for ±U; an arrowhead at the side where an
 * outside error left. Its width stands for the limit, so slivers of different limits compare.
 * A picture of figures that stand beside it, hence hidden from assistive technology.
 */
export function Sliver({ errorOhms, limitOhms, uncertaintyOhms = null, verdict, className }: SliverProps) {
  const ratio = errorOhms !== null && limitOhms ? errorOhms / limitOhms : null;
  return (
    <svg
      aria-hidden="true"
      viewBox="0 0 56 14"
      className={classNames("inline-block h-3.5 w-14 min-w-8 align-middle", VERDICT_INKS[verdict], className)}
    >
      {limitOhms !== null && (
        <>
          <rect x="10" y="4.5" width="36" height="5" fill="none" className="stroke-line-strong" />
          <path d="M28 2v10" className="stroke-line-strong" />
        </>
      )}
      {ratio !== null && <ErrorTick ratio={ratio} half={bandShare(uncertaintyOhms, limitOhms)} verdict={verdict} />}
    </svg>
  );
}

function bandShare(uncertaintyOhms: number | null, limitOhms: number | null): number | null {
  return uncertaintyOhms !== null && limitOhms ? uncertaintyOhms / limitOhms : null;
}

function ErrorTick({ ratio, half, verdict }: { ratio: number; half: number | null; verdict: PointVerdict }) {
  if (verdict === "outside" || Math.abs(ratio) > FARTHEST) {
    return (
      <path
        d={ratio < 0 ? "M1 7 9 1v12z" : "M55 7 47 1v12z"}
        fill="currentColor"
        data-arrow={ratio < 0 ? "low" : "high"}
      />
    );
  }
  const x = CENTRE + ratio * HALF_BAND;
  return (
    <>
      {half !== null && (
        <path
          d={`M${clip(x - half * HALF_BAND)} 7H${clip(x + half * HALF_BAND)}`}
          stroke="currentColor"
          strokeWidth="1.6"
        />
      )}
      <rect x={(x - 1.5).toFixed(2)} y="1" width="3" height="12" fill="currentColor" />
    </>
  );
}

function clip(x: number): string {
  return Math.min(55, Math.max(1, x)).toFixed(2);
}

/** What a sliver needs of a judgement. */
export function sliverProps(judgement: Judgement): SliverProps {
  return {
    errorOhms: judgement.errorOhms,
    limitOhms: judgement.limitOhms,
    uncertaintyOhms: judgement.uncertainty?.expandedOhms ?? null,
    verdict: judgement.verdict,
  };
}
