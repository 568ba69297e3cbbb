"use client";

import { StairLine } from "@/components/marks/stair-line";
import { Button } from "@/components/ui/button";
import { Segmented } from "@/components/ui/segmented";
import { REPLAY_SPEEDS, type ReplaySpeed, type ReplayView } from "@/lib/client/replay-store";
import { nextOutsideSeq, scrubPlace, type PointSpan } from "@/lib/client/replay-stops";
import type { StairGroup } from "@/lib/schemas/run";
import { counter } from "./replay-words";

export interface ReplayBarProps {
  view: ReplayView;
  spans: readonly PointSpan[];
  groups: readonly StairGroup[];
  lastElapsedMs: number;
  /** The moment in words, for assistive technology. */
  moment: string;
}

const SPEEDS = REPLAY_SPEEDS.map((speed) => ({ value: String(speed), label: `${speed}×` }));

/** The stair line as the scrubber, and what moves it. */
export function ReplayBar({ view, spans, groups, lastElapsedMs, moment }: ReplayBarProps) {
  return (
    <section aria-label="Replay" className="rounded border border-line bg-panel px-3.5 pt-4.5 pb-3">
      <StairLine
        groups={groups}
        size="large"
        cursor={scrubPlace(spans, view.seq)}
        cursorText={moment}
        onScrub={({ point, fraction }) => view.scrub(point, fraction)}
      />
      <div className="mt-2.5 flex flex-wrap items-center gap-x-3.5 gap-y-2">
        <PlayButton isPlaying={view.isPlaying} onToggle={view.togglePlay} />
        <Segmented
          label="Speed"
          value={String(view.speed)}
          segments={SPEEDS}
          onChange={(speed) => view.setSpeed(Number(speed) as ReplaySpeed)}
        />
        <span className="min-w-34 font-mono tabular">
          {counter(view.elapsedMs)} of {counter(lastElapsedMs)}
        </span>
        <div className="flex flex-wrap gap-2 sm:ml-auto">
          <Button size="small" onClick={view.pointBefore} aria-keyshortcuts="ArrowLeft">
            Point before
          </Button>
          <Button size="small" onClick={view.nextPoint} aria-keyshortcuts="ArrowRight">
            Next point
          </Button>
          <Button
            size="small"
            onClick={view.nextOutside}
            disabled={nextOutsideSeq(spans, view.seq) === null}
            aria-keyshortcuts="N"
          >
            Next outside limit
          </Button>
        </div>
        <p className="text-label text-ink-2 max-sm:hidden">Space plays, arrows step, N next outside limit</p>
      </div>
    </section>
  );
}

function PlayButton({ isPlaying, onToggle }: { isPlaying: boolean; onToggle: () => void }) {
  return (
    <button
      type="button"
      aria-label={isPlaying ? "Pause" : "Play"}
      aria-keyshortcuts="Space"
      onClick={onToggle}
      className="grid size-9 flex-none place-items-center rounded border border-ink bg-ink text-panel max-sm:size-12"
    >
      <svg aria-hidden="true" viewBox="0 0 12 12" className="size-3.5" fill="currentColor">
        <path d={isPlaying ? "M1 1h3.5v10H1zM7.5 1H11v10H7.5z" : "M1.5 0.5 11.5 6l-10 5.5z"} />
      </svg>
    </button>
  );
}
