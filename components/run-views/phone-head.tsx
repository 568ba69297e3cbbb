import { StateLine } from "@/components/run/state-line";
import { Breadcrumb } from "@/components/ui/breadcrumb";
import { pointName } from "@/lib/journal/describe-event";
import type { RunState } from "@/lib/journal/run-state";
import { unitTitle } from "@/lib/journal/selectors";
import { stateSentence, type StateSentence } from "@/lib/journal/state-sentence";
import type { OutputState } from "@/lib/schemas/bench";
import { formatDuration, formatTerminalVolts } from "@/lib/units/format";
import type { RunTimes } from "./run-times";

/** Where, what, what it does, and whether the terminals are live, in four lines. */
export function PhoneHead({ state, times }: { state: RunState; times: RunTimes | null }) {
  const { setup, output } = state;
  return (
    <div className="sm:hidden">
      <Breadcrumb
        crumbs={[{ label: setup?.bench.name ?? "Bench", href: "/benches" }, { label: `Run ${setup?.runNumber ?? ""}` }]}
      />
      <h1 className="text-band leading-7">{unitTitle(state)}</h1>
      <StateLine sentence={phoneSentence(state)} className="mt-1" />
      <p className="min-h-5.5 text-ink-2">
        {pointWords(state)}
        {times?.left && (
          <>
            <b className="text-ink">{formatDuration(times.left.seconds)}</b> left,{" "}
          </>
        )}
        <span className={output.state === "off" ? undefined : "font-semibold text-ink"}>{outputWords(output)}</span>
      </p>
    </div>
  );
}

/** While a point is measured its number stands in the line below. */
function phoneSentence(state: RunState): StateSentence {
  const sentence = stateSentence(state);
  if (state.status !== "running" || !state.active) return sentence;
  return { ...sentence, rest: pointName(state.setup, state.active.point) };
}

function pointWords({ active, points }: RunState): string {
  return active ? `Point ${active.point + 1} of ${points.length}, ` : "";
}

function outputWords({ state, volts }: OutputState): string {
  if (state === "off") return "output off";
  if (state === "unknown") return "output unknown: treat the terminals as live";
  return volts === null ? "output on" : `output on, ${formatTerminalVolts(volts)}`;
}
