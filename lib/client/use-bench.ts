"use client";

import { useEffect, useState } from "react";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import { followSnapshots } from "./bench-follower";
import { joinLiveLink } from "./socket";

/** One bench as it is at this moment, its room included; from what the server rendered on. */
export function useBench(benchId: string, initial: BenchSnapshot | null): BenchSnapshot | null {
  const [bench, setBench] = useState(initial);
  useEffect(() => {
    const { socket, onWake } = joinLiveLink();
    const take = (snapshot: BenchSnapshot) => {
      if (snapshot.id === benchId) setBench(snapshot);
    };
    return followSnapshots({ socket, onWake, onAll: (benches) => benches.forEach(take), onOne: take });
  }, [benchId]);
  return bench;
}
