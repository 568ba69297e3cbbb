import type { Clock } from "./clock";

/** A sleep on top of a clock's `schedule`. Rejects with the signal's reason when aborted, and leaves no wake-up behind. */
export function abortableSleep(clock: Pick<Clock, "schedule">, ms: number, signal?: AbortSignal): Promise<void> {
  return new Promise((resolve, reject) => {
    if (signal?.aborted) return reject(signal.reason as Error);
    const onAbort = () => {
      cancel();
      reject(signal?.reason as Error);
    };
    const cancel = clock.schedule(ms, () => {
      signal?.removeEventListener("abort", onAbort);
      resolve();
    });
    signal?.addEventListener("abort", onAbort, { once: true });
  });
}
