import { displayResolutionOhms } from "@/lib/metrology/accuracy";
import type { ActivePoint, RunState } from "@/lib/journal/run-state";
import { presentPoint } from "@/lib/journal/selectors";
import type { PlannedPoint } from "@/lib/schemas/plan";
import {
  formatDuration,
  formatErrorPercent,
  formatOhms,
  formatQuantity,
  formatTerminalVolts,
} from "@/lib/units/format";
import { classNames } from "@/components/ui/class-names";
import { Facts, type Fact } from "@/components/ui/facts";
import { Panel } from "@/components/ui/panel";
import { Dials } from "./dials";
import { Indication } from "./indication";
import { nowProgress, nowSentence } from "./now-words";
import { SettlingBar } from "./settling-bar";

export interface NowPanelProps {
  state: RunState;
  /** `Now` while it happens, `Then` in a replay. */
  title?: "Now" | "Then";
  /** Replay: how this point ended, which its moment did not know yet. */
  endedAt?: { ohms: number | null; settlingSeconds: number } | null;
  /** Values are old: they are drawn in the ink of what is off. */
  stale?: boolean;
}

/** The present point: dials, indication, the standard behind it, and how near it is to settled. */
export function NowPanel({ state, title = "Now", endedAt, stale = false }: NowPanelProps) {
  const { setup, active } = state;
  const standard = setup?.bench.standard;
  return (
    <Panel
      title={title}
      note={standard && `${standard.maker} ${standard.model} at the terminals`}
      right={state.dials ? "dials read back" : "dials not read back yet"}
    >
      <div className={classNames("grid gap-3", stale && "text-ink-3")}>
        <Dials stepOhms={standard?.decades.map((decade) => decade.stepOhms) ?? []} positions={state.dials} />
        <div className="flex flex-wrap items-end gap-x-6.5 gap-y-2">
          <Indication
            ohms={active?.indicationOhms ?? null}
            overRange={active?.overRange}
            resolutionOhms={resolutionOf(state, active?.indicationOhms ?? null)}
          />
          <Facts className="pb-1.5" facts={nowFacts(presentPoint(state), active, endedAt ?? null)} />
        </div>
        <SettlingBar progress={nowProgress(state)} sentence={nowSentence(state)} />
      </div>
    </Panel>
  );
}

function resolutionOf(state: RunState, ohms: number | null): number | undefined {
  const ranges = state.setup?.unit.model.ranges;
  return ranges && ohms !== null ? displayResolutionOhms(ranges, ohms) : undefined;
}

function nowFacts(
  planned: PlannedPoint | null,
  active: ActivePoint | null,
  endedAt: { ohms: number | null; settlingSeconds: number } | null,
): Fact[] {
  return [
    { term: "Standard", value: planned ? standardWords(planned) : "–", mono: true },
    { term: "Drift", value: driftWords(active), mono: true },
    endedAt
      ? { term: "Ended at", value: endedWords(endedAt), mono: true }
      : { term: "Terminals", value: terminalWords(active), mono: true },
  ];
}

function standardWords({ standardOhms, standardUncertaintyOhms }: PlannedPoint): string {
  const percent = (standardUncertaintyOhms / standardOhms) * 100;
  return `${formatOhms(standardOhms)} ±${percent.toPrecision(2)} %`;
}

function driftWords(active: ActivePoint | null): string {
  const drift = active?.assessment?.driftPercentPerMinute ?? null;
  return drift === null ? "–" : `${formatErrorPercent(drift, Math.abs(drift) < 0.1 ? 2 : 1)} % a minute`;
}

function terminalWords(active: ActivePoint | null): string {
  if (!active || active.terminalVolts === null) return "–";
  const current = active.terminalAmperes;
  const volts = formatTerminalVolts(active.terminalVolts);
  return current === null ? volts : `${volts}\u2003${formatQuantity(current, "A", { digits: 3 })}`;
}

function endedWords({ ohms, settlingSeconds }: { ohms: number | null; settlingSeconds: number }): string {
  return `${ohms === null ? "over range" : formatOhms(ohms)} after ${formatDuration(settlingSeconds)}`;
}
