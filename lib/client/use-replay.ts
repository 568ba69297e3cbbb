"use client";

import { useEffect, useState } from "react";
import { useStore } from "zustand";
import type { JournalColumns } from "@/lib/schemas/journal-columns";
import { createReplayStore, type ReplayStore, type ReplayView } from "./replay-store";
import { pointSpans, type PointSpan } from "./replay-stops";
import { createTimeline, type ReplayTimeline } from "./replay-timeline";

export interface Replay {
  timeline: ReplayTimeline;
  spans: readonly PointSpan[];
  view: ReplayView;
}

/** The URL follows the moment once it stands still, so that a moment can be sent to somebody. */
const URL_AFTER_MS = 300;
/** A replay is drawn as often as a live run is told. */
const FRAME_MS = 45;

/** A replay of one journal from the moment `atSeq`. */
export function useReplay(columns: JournalColumns, atSeq: number): Replay {
  const [{ timeline, spans, store }] = useState(() => {
    const timeline = createTimeline(columns);
    const spans = pointSpans(columns.events, timeline.lastSeq);
    return { timeline, spans, store: createReplayStore(timeline, spans, atSeq) };
  });
  const view = useStore(store);
  useEffect(() => (view.isPlaying ? playFrames(store) : undefined), [store, view.isPlaying]);
  useEffect(() => {
    if (view.isPlaying) return;
    const timer = setTimeout(() => writeMoment(view.seq), URL_AFTER_MS);
    return () => clearTimeout(timer);
  }, [view.seq, view.isPlaying]);
  return { timeline, spans, view };
}

function playFrames(store: ReplayStore): () => void {
  let lastMs = performance.now();
  let frame = requestAnimationFrame(function next(nowMs) {
    if (nowMs - lastMs >= FRAME_MS) {
      store.getState().tick(nowMs - lastMs);
      lastMs = nowMs;
    }
    frame = requestAnimationFrame(next);
  });
  return () => cancelAnimationFrame(frame);
}

function writeMoment(seq: number): void {
  const url = new URL(window.location.href);
  if (url.searchParams.get("at") === String(seq)) return;
  url.searchParams.set("at", String(seq));
  window.history.replaceState(null, "", url);
}
