"use client";

import { useSyncExternalStore } from "react";

let nowMs = 0;
let timer: ReturnType<typeof setInterval> | null = null;
const listeners = new Set<() => void>();

function tick(): void {
  nowMs = Date.now();
  for (const listener of listeners) listener();
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  timer ??= setInterval(tick, 1000);
  tick();
  return () => {
    listeners.delete(listener);
    if (listeners.size > 0 || timer === null) return;
    clearInterval(timer);
    timer = null;
  };
}

/** The time by this machine's clock, once a second; `initialMs` (the server's) for the first render. */
export function useNow(initialMs: number): number {
  return useSyncExternalStore(
    subscribe,
    () => nowMs || initialMs,
    () => initialMs,
  );
}
