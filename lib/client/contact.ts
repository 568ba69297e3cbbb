import { createStore, type StoreApi } from "zustand/vanilla";

/** Silence longer than this makes what is on the screen old. The server's heart beats once a second. */
export const STALE_AFTER_MS = 5000;

export interface Contact {
  /** When the server was last heard, by this machine's clock. */
  lastHeardMs: number;
  /** Since when there is no contact; null while there is. */
  staleSinceMs: number | null;
  /** Why the server will not talk to this page, in words; null when it will. */
  refusal: string | null;
}

export interface ContactView extends Contact {
  heard(nowMs: number): void;
  /** To be called about once a second. */
  check(nowMs: number): void;
  refused(message: string): void;
}

export type ContactStore = StoreApi<ContactView>;

/** Whether the server is heard. Knows no clock: every time is handed in. */
export function createContactStore(startMs: number): ContactStore {
  return createStore<ContactView>()((set, get) => ({
    lastHeardMs: startMs,
    staleSinceMs: null,
    refusal: null,
    heard: (nowMs) => set({ lastHeardMs: nowMs, staleSinceMs: null, refusal: null }),
    check(nowMs) {
      const { lastHeardMs, staleSinceMs } = get();
      if (staleSinceMs === null && nowMs - lastHeardMs > STALE_AFTER_MS) set({ staleSinceMs: lastHeardMs });
    },
    refused: (refusal) => set({ refusal }),
  }));
}
