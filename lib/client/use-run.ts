"use client";

import { useEffect, useState } from "react";
import { useStore } from "zustand";
import type { RunState } from "@/lib/journal/run-state";
import { api } from "./api";
import type { Contact } from "./contact";
import { followRun } from "./run-follower";
import { createRunStore } from "./run-store";
import { joinLiveLink } from "./socket";
import { useContact } from "./use-contact";

export interface LiveRun {
  state: RunState;
  contact: Contact;
}

/** One run, live: from the state that the server rendered on. Mount it with `key={runId}`. */
export function useRun(runId: string, initial: RunState): LiveRun {
  const [store] = useState(() => createRunStore(initial));
  useEffect(() => {
    const { socket, contact, onWake } = joinLiveLink();
    return followRun({
      runId,
      store,
      socket,
      onWake,
      fetchState: api.runState,
      onRefused: contact.getState().refused,
    });
  }, [runId, store]);
  return { state: useStore(store, (view) => view.run), contact: useContact() };
}
