import { displayResolutionOhms } from "@/lib/metrology/accuracy";
import type { RunState } from "@/lib/journal/run-state";
import { presentPoint } from "@/lib/journal/selectors";
import type { PointTraceData } from "./trace-frame";

/** The trace of the attempt under way, as the chart takes it; null while no point is being measured. */
export function pointTraceData(state: RunState): PointTraceData | null {
  const { active, setup } = state;
  const planned = presentPoint(state);
  if (!active || !planned || !setup) return null;
  const { assessment } = active;
  return {
    samples: active.trace,
    standardOhms: planned.standardOhms,
    limitOhms: planned.limitOhms,
    expectedOhms: assessment?.expectedOhms ?? null,
    fittedSeconds: assessment?.fittedSeconds ?? null,
    windowFromSeconds: assessment?.windowFromSeconds ?? null,
    resolutionOhms: displayResolutionOhms(setup.unit.model.ranges, active.indicationOhms ?? planned.standardOhms),
  };
}
