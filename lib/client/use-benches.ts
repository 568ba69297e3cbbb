"use client";

import { useEffect, useState } from "react";
import { useStore } from "zustand";
import { api } from "./api";
import { createBenchesStore, followBenches, type BenchesView } from "./bench-follower";
import type { Contact } from "./contact";
import { joinLiveLink } from "./socket";
import { useContact } from "./use-contact";

/** All benches and their active runs, live: from what the server rendered on. */
export function useBenches(initial: BenchesView): BenchesView & { contact: Contact } {
  const [store] = useState(() => createBenchesStore(initial));
  useEffect(() => {
    const { socket, contact, onWake } = joinLiveLink();
    return followBenches({
      store,
      socket,
      onWake,
      fetchState: api.runState,
      onRefused: contact.getState().refused,
    });
  }, [store]);
  return { ...useStore(store), contact: useContact() };
}
