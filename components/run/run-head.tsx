import type { ReactNode } from "react";
import type { StateSentence } from "@/lib/journal/state-sentence";
import { formatDuration, formatExactDuration } from "@/lib/units/format";
import { Breadcrumb, type Crumb } from "@/components/ui/breadcrumb";
import { ClockTime } from "@/components/ui/clock-time";
import { Facts } from "@/components/ui/facts";
import { StateLine } from "./state-line";

export interface RunHeadTimes {
  runningSeconds: number;
  /** Null when nothing is left or the run stands still. */
  left: { seconds: number; spreadSeconds: number; doneAtMs: number } | null;
}

export interface RunHeadProps {
  crumbs: readonly Crumb[];
  title: string;
  sentence: StateSentence;
  times?: RunHeadTimes | null;
  /** Commands or views at the right end; Stop stands last. */
  commands?: ReactNode;
}

/** Where, what, and what it does at this moment. */
export function RunHead({ crumbs, title, sentence, times, commands }: RunHeadProps) {
  return (
    <div className="flex flex-wrap items-start gap-x-5 gap-y-3">
      <div className="min-w-0 flex-[1_1_22rem]">
        <Breadcrumb crumbs={crumbs} />
        <h1 className="mt-0.5">{title}</h1>
        <StateLine sentence={sentence} className="mt-0.5" />
      </div>
      {times && <RunTimesFacts times={times} />}
      {commands && <div className="ml-auto flex flex-wrap gap-2 max-sm:ml-0 max-sm:w-full">{commands}</div>}
    </div>
  );
}

function RunTimesFacts({ times: { runningSeconds, left } }: { times: RunHeadTimes }) {
  return (
    <Facts
      align="right"
      className="sm:min-w-52"
      facts={[
        { term: "Running for", value: formatExactDuration(runningSeconds), mono: true },
        {
          term: "Time left",
          mono: true,
          value: left && (
            <>
              <b>{formatDuration(left.seconds)}</b> ± {spreadWords(left.seconds, left.spreadSeconds)}
            </>
          ),
        },
        { term: "Done by", value: left && <ClockTime atMs={left.doneAtMs} />, mono: true },
      ]}
    />
  );
}

/** The spread in the unit of the time that stands before it. */
function spreadWords(seconds: number, spreadSeconds: number): string {
  return seconds < 60 ? String(Math.ceil(spreadSeconds)) : String(Math.max(1, Math.round(spreadSeconds / 60)));
}
