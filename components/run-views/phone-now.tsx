import { Indication } from "@/components/now/indication";
import { nowProgress, nowSentence } from "@/components/now/now-words";
import { SettlingBar } from "@/components/now/settling-bar";
import { classNames } from "@/components/ui/class-names";
import { displayResolutionOhms } from "@/lib/metrology/accuracy";
import type { RunState } from "@/lib/journal/run-state";

/** The indication and how near it is to settled: what a person away from the bench wants first. */
export function PhoneNow({ state, stale }: { state: RunState; stale: boolean }) {
  const ohms = state.active?.indicationOhms ?? null;
  const ranges = state.setup?.unit.model.ranges;
  return (
    <section
      aria-label="Now"
      className={classNames("grid gap-2 rounded border border-line bg-panel px-3.5 py-3", stale && "text-ink-3")}
    >
      <Indication
        ohms={ohms}
        overRange={state.active?.overRange}
        resolutionOhms={ranges && ohms !== null ? displayResolutionOhms(ranges, ohms) : undefined}
      />
      <SettlingBar progress={nowProgress(state)} sentence={nowSentence(state)} />
    </section>
  );
}
