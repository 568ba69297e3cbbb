import { z } from "zod";
import type { BenchSnapshot } from "./bench";
import type { RunEvent } from "./run-event";

/** A client follows a run from the last `seq` it holds. */
export const followRunSchema = z.object({ runId: z.string().min(1).max(64), afterSeq: z.int().nonnegative() });
export type FollowRun = z.infer<typeof followRunSchema>;

export const unfollowRunSchema = z.object({ runId: z.string().min(1).max(64) });

/**
 * Answer to `run:follow`: the records missed, or `reload` when they are so many that the state over HTTP is the shorter way,
 * or why it was refused.
 */
export type FollowReply =
  { kind: "records"; records: RunEvent[] } | { kind: "reload" } | { kind: "refused"; message: string };

export interface ServerToClientEvents {
  "run:records": (message: { runId: string; records: RunEvent[] }) => void;
  "bench:changed": (snapshot: BenchSnapshot) => void;
  /** Once a second, so that silence is noticed. */
  heartbeat: (message: { atMs: number }) => void;
}

export interface ClientToServerEvents {
  "run:follow": (message: FollowRun, reply: (answer: FollowReply) => void) => void;
  "run:unfollow": (message: { runId: string }) => void;
  "benches:follow": (reply: (snapshots: BenchSnapshot[]) => void) => void;
}
