import type { ReactNode } from "react";
import { displayResolutionOhms } from "@/lib/metrology/accuracy";
import type { RunState } from "@/lib/journal/run-state";
import { stairGroups, timeLeft } from "@/lib/journal/selectors";
import { stateSentence } from "@/lib/journal/state-sentence";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import { formatOhms, formatTerminalVolts, THIN_SPACE } from "@/lib/units/format";
import { StairLine } from "@/components/marks/stair-line";
import { StateLine } from "@/components/run/state-line";
import { classNames } from "@/components/ui/class-names";
import { ClockTime } from "@/components/ui/clock-time";
import { TimeLarge } from "./time-large";

export interface BenchBandProps {
  snapshot: BenchSnapshot;
  /** The run that is not over on this bench. */
  run: RunState | null;
  /** Watch, Hold, Stop, or Start a run. */
  actions?: ReactNode;
  /** How fast the bench's time runs; 1 on hardware. Taken from the run when it is not given. */
  clockSpeed?: number;
  /** The present, for 'done by'; left out on the server. */
  nowMs?: number | null;
  /** What a free bench has next, in words. */
  next?: string;
  /** Values are old: they are drawn in the ink of what is off. */
  stale?: boolean;
}

/** One bench: what stands on it, what it does, how long it will take. Hatched at its edge while a voltage may be present. */
export function BenchBand(props: BenchBandProps) {
  const { snapshot, run, stale = false } = props;
  const isHazardous = snapshot.output.state !== "off";
  return (
    <section
      aria-label={snapshot.name}
      className={classNames("relative overflow-hidden rounded border border-line bg-panel", stale && "text-ink-3")}
    >
      {isHazardous && <div aria-hidden="true" className="hatch absolute inset-y-0 left-0 w-3.5" />}
      <div
        className={classNames(
          "grid items-start gap-x-6 gap-y-3 py-3.5 pr-4.5",
          // The hatch takes its width from the first column, so that the bands' columns stand under each other; it keeps
          // its room while a run goes on, so that nothing moves as the output goes on and off.
          isHazardous || run !== null
            ? "pl-8 lg:grid-cols-[16.125rem_minmax(0,1fr)_15rem]"
            : "pl-4.5 lg:grid-cols-[17rem_minmax(0,1fr)_15rem]",
        )}
      >
        <BenchFacts snapshot={snapshot} run={run} />
        <BenchDoing {...props} />
        <BenchTime {...props} />
      </div>
    </section>
  );
}

function BenchFacts({ snapshot, run }: Pick<BenchBandProps, "snapshot" | "run">) {
  const setup = run?.setup;
  return (
    <div>
      <h2 className="text-band">{snapshot.name}</h2>
      <p className="text-ink-2">{roomWords(snapshot)}</p>
      {setup && (
        <>
          <p className="mt-2">
            <b>
              {setup.unit.model.maker} {setup.unit.model.model}
            </b>
            , {setup.unit.assetNumber}
          </p>
          <p className="text-label text-ink-2">
            {setup.recipe.document.name}, v{setup.recipe.version} · {setup.by.name}
          </p>
        </>
      )}
    </div>
  );
}

function roomWords({ roomName, room, simulated }: BenchSnapshot): string {
  const celsius = room && `${room.celsius.toFixed(1)}${THIN_SPACE}°C`;
  const humidity = room && room.humidityPercent !== null && `${room.humidityPercent.toFixed(0)}${THIN_SPACE}% r.h.`;
  return [roomName, celsius, humidity, simulated && "simulated"].filter(Boolean).join(", ");
}

function BenchDoing({ snapshot, run, next }: BenchBandProps) {
  if (!run?.setup) {
    return (
      <div>
        {snapshot.trouble ? (
          <StateLine sentence={{ lead: "Needs a person", rest: snapshot.trouble, tone: "brick" }} />
        ) : (
          <p className="text-state">
            <b className="mr-2">Free</b>
            {next && <span className="text-ink-2">{next}</span>}
          </p>
        )}
      </div>
    );
  }
  return (
    <div className="min-w-0">
      <StateLine sentence={withReading(run)} />
      {snapshot.trouble && <p className="mt-1 text-brick">{snapshot.trouble}</p>}
      <StairLine groups={stairGroups(run)} size="band" className="mt-2.5" />
    </div>
  );
}

/** The state and what the display shows at this moment. */
function withReading(run: RunState) {
  const sentence = stateSentence(run);
  const ohms = run.active?.indicationOhms ?? null;
  if (run.status !== "running" || ohms === null) return sentence;
  const ranges = run.setup?.unit.model.ranges;
  const reading = formatOhms(ohms, ranges && displayResolutionOhms(ranges, ohms));
  return { ...sentence, rest: `${sentence.rest}, reads ${reading}` };
}

function BenchTime({ snapshot, run, actions, clockSpeed, nowMs = null }: BenchBandProps) {
  const left = run && timeLeft(run);
  const speed = clockSpeed ?? run?.setup?.clockSpeed ?? 1;
  const leftSeconds = left && left.seconds / speed;
  return (
    <div className="lg:text-right">
      {leftSeconds !== null && <TimeLarge seconds={leftSeconds} />}
      <p className="text-label text-ink-2">
        {leftSeconds !== null && nowMs !== null && run?.status === "running" && (
          <>
            done by <ClockTime atMs={nowMs + leftSeconds * 1000} /> ·{" "}
          </>
        )}
        {outputInWords(snapshot)}
        {speed !== 1 && ` · time runs at ${speed}×`}
      </p>
      {actions && <div className="mt-3 flex flex-wrap gap-2 lg:justify-end">{actions}</div>}
    </div>
  );
}

function outputInWords({ output }: BenchSnapshot): ReactNode {
  if (output.state === "off") return "output off, proven";
  if (output.state === "unknown") return <b className="text-ink">output unknown: treat the terminals as live</b>;
  return (
    <b className="text-ink">
      {output.volts === null ? "output on" : `output on, ${formatTerminalVolts(output.volts)}`}
    </b>
  );
}
