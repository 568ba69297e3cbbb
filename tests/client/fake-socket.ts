import type { FollowSocket } from "@/lib/client/run-follower";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import type { FollowReply } from "@/lib/schemas/socket";

type Listener = (...payload: never[]) => void;

/** What the client said, and a way to answer it; a stand-in for the network, not for the client. */
export class FakeSocket {
  connected = true;
  readonly asked: { runId: string; afterSeq: number; reply: (answer: FollowReply) => void }[] = [];
  readonly askedForBenches: ((snapshots: BenchSnapshot[]) => void)[] = [];
  readonly unfollowed: string[] = [];
  private readonly listeners = new Map<string, Set<Listener>>();

  on(event: string, listener: Listener): this {
    if (!this.listeners.has(event)) this.listeners.set(event, new Set());
    this.listeners.get(event)!.add(listener);
    return this;
  }

  off(event: string, listener: Listener): this {
    this.listeners.get(event)?.delete(listener);
    return this;
  }

  emit(event: string, ...payload: unknown[]): this {
    if (event === "run:follow") {
      const [message, reply] = payload as [{ runId: string; afterSeq: number }, (answer: FollowReply) => void];
      this.asked.push({ ...message, reply });
    }
    if (event === "benches:follow") this.askedForBenches.push(payload[0] as (snapshots: BenchSnapshot[]) => void);
    if (event === "run:unfollow") this.unfollowed.push((payload[0] as { runId: string }).runId);
    return this;
  }

  /** A message from the server. */
  hear(event: string, ...payload: unknown[]): void {
    for (const listener of this.listeners.get(event) ?? []) (listener as (...values: unknown[]) => void)(...payload);
  }

  asFollowSocket(): FollowSocket {
    return this as unknown as FollowSocket;
  }
}
