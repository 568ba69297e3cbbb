import type { RunState } from "@/lib/journal/run-state";
import type { FollowReply } from "@/lib/schemas/socket";
import type { RunEvent } from "@/lib/schemas/run-event";
import type { LiveSocket } from "./socket";
import type { RunStore } from "./run-store";

/** The part of the socket that following needs. */
export type FollowSocket = Pick<LiveSocket, "connected" | "on" | "off" | "emit">;

export interface RunFollowing {
  runId: string;
  store: RunStore;
  socket: FollowSocket;
  onWake(listener: () => void): () => void;
  /** The whole state over HTTP, when the records missed are too many. */
  fetchState(runId: string): Promise<RunState>;
  onRefused(message: string): void;
}

/**
 * Keeps a run's store up with the server: asks for what is missing on every connect, wake and gap.
 * Returns a function that ends it.
 */
export function followRun({ runId, store, socket, onWake, fetchState, onRefused }: RunFollowing): () => void {
  let isEnded = false;
  let isReloading = false;
  let isAsking = false;

  const ask = () => {
    if (isEnded || !socket.connected) return;
    isAsking = true;
    socket.emit("run:follow", { runId, afterSeq: store.getState().run.lastSeq }, (reply) => void take(reply));
  };
  const take = async (reply: FollowReply) => {
    isAsking = false;
    if (isEnded) return;
    if (reply.kind === "records") receive(reply.records);
    else if (reply.kind === "reload") await reload();
    else onRefused(reply.message);
  };
  const receive = (records: readonly RunEvent[]) => {
    if (store.getState().receive(records) === "gap" && !isReloading && !isAsking) ask();
  };
  const reload = async () => {
    if (isReloading) return;
    isReloading = true;
    const state = await fetchState(runId).catch(() => null);
    isReloading = false;
    if (isEnded || !state) return;
    store.getState().replace(state);
    ask();
  };
  const hear = (message: { runId: string; records: RunEvent[] }) => {
    if (message.runId === runId) receive(message.records);
  };

  socket.on("connect", ask);
  socket.on("run:records", hear);
  const stopWaking = onWake(ask);
  ask();
  return () => {
    isEnded = true;
    socket.off("connect", ask);
    socket.off("run:records", hear);
    stopWaking();
    if (socket.connected) socket.emit("run:unfollow", { runId });
  };
}
