import type { Server as HttpServer, IncomingMessage } from "node:http";
import { Server, type Socket } from "socket.io";
import type { RunFeed } from "@/lib/engine/run-feed";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import type { RunEvent } from "@/lib/schemas/run-event";
import {
  followRunSchema,
  unfollowRunSchema,
  type ClientToServerEvents,
  type FollowReply,
  type ServerToClientEvents,
} from "@/lib/schemas/socket";
import { isAllowedHost, isOwnOrigin } from "./origin";

/** Batches go out at most so often. */
const BATCH_MS = 50;
const HEARTBEAT_MS = 1000;
/** A client that missed more than this fetches the folded state instead. */
const MOST_RECORDS_SENT = 3000;
const SESSION_CHECK_MS = 60_000;

export interface SessionHandle {
  sessionId: string;
  personId: string;
}

export interface GatewayDependencies {
  server: HttpServer;
  allowedHosts: readonly string[];
  feed: RunFeed;
  /** Session of a cookie header, if it is valid and may watch; null otherwise. */
  authenticate: (cookieHeader: string) => Promise<SessionHandle | null>;
  isSessionValid: (handle: SessionHandle) => Promise<boolean>;
  onSessionRevoked: (listener: (sessionId: string) => void) => () => void;
  snapshots: () => BenchSnapshot[];
  records: (runId: string, options: { afterSeq: number; limit: number }) => Promise<RunEvent[]>;
  onError: (message: string, error: unknown) => void;
}

type Gateway = Server<ClientToServerEvents, ServerToClientEvents, Record<string, never>, { session: SessionHandle }>;
type Client = Socket<ClientToServerEvents, ServerToClientEvents, Record<string, never>, { session: SessionHandle }>;

/** Live records over socket.io: origin and session checked, from the last `seq` on, in batches. Returns a function that closes it. */
export function openSocketGateway(dependencies: GatewayDependencies): { close: () => Promise<void>; io: Gateway } {
  const io: Gateway = new Server(dependencies.server, {
    serveClient: false,
    maxHttpBufferSize: 16_384,
    allowRequest: (request, decide) => decide(null, isOwnRequest(request, dependencies.allowedHosts)),
  });
  io.use((socket, next) => void admit(socket as Client, dependencies, next));
  io.on("connection", (socket) => serve(socket as Client, dependencies));
  const stopBatches = batchRecords(io, dependencies.feed);
  const stopBenches = dependencies.feed.onBench((snapshot) => io.to("benches").emit("bench:changed", snapshot));
  const stopRevoked = dependencies.onSessionRevoked((id) => io.in(sessionRoom(id)).disconnectSockets(true));
  const heartbeat = setInterval(() => io.emit("heartbeat", { atMs: Date.now() }), HEARTBEAT_MS);
  const close = async () => {
    clearInterval(heartbeat);
    stopBatches();
    stopBenches();
    stopRevoked();
    await io.close();
  };
  return { close, io };
}

function isOwnRequest(request: IncomingMessage, allowedHosts: readonly string[]): boolean {
  const { origin, host } = request.headers;
  return isAllowedHost(host, allowedHosts) && isOwnOrigin({ origin, host, fetchSite: null });
}

async function admit(socket: Client, { authenticate, onError }: GatewayDependencies, next: (error?: Error) => void) {
  try {
    const session = await authenticate(socket.handshake.headers.cookie ?? "");
    if (!session) return next(new Error("unauthenticated"));
    socket.data.session = session;
    next();
  } catch (error) {
    onError("a socket could not be admitted", error);
    next(new Error("unavailable"));
  }
}

function serve(socket: Client, dependencies: GatewayDependencies): void {
  const { session } = socket.data;
  void socket.join(sessionRoom(session.sessionId));
  const check = setInterval(() => void disconnectIfEnded(socket, dependencies), SESSION_CHECK_MS);
  socket.on("disconnect", () => clearInterval(check));
  socket.on("benches:follow", (reply) => {
    void socket.join("benches");
    if (typeof reply === "function") reply(dependencies.snapshots());
  });
  socket.on("run:follow", (message, reply) => void follow(socket, dependencies, message, reply));
  socket.on("run:unfollow", (message) => {
    const parsed = unfollowRunSchema.safeParse(message);
    if (parsed.success) void socket.leave(runRoom(parsed.data.runId));
  });
}

async function disconnectIfEnded(socket: Client, { isSessionValid, onError }: GatewayDependencies): Promise<void> {
  try {
    if (!(await isSessionValid(socket.data.session))) socket.disconnect(true);
  } catch (error) {
    onError("a session could not be checked", error);
  }
}

/** Joins first, then sends what is missing: a record that comes in between arrives twice, never not at all. */
async function follow(
  socket: Client,
  { records, onError }: GatewayDependencies,
  message: unknown,
  reply: (answer: FollowReply) => void,
): Promise<void> {
  const parsed = followRunSchema.safeParse(message);
  if (typeof reply !== "function") return;
  if (!parsed.success) return reply({ kind: "refused", message: "This is not a run to follow." });
  const { runId, afterSeq } = parsed.data;
  try {
    await socket.join(runRoom(runId));
    const missed = await records(runId, { afterSeq, limit: MOST_RECORDS_SENT + 1 });
    if (missed.length > MOST_RECORDS_SENT) reply({ kind: "reload" });
    else reply({ kind: "records", records: missed });
  } catch (error) {
    onError(`run ${runId} could not be followed`, error);
    reply({ kind: "refused", message: "The journal can't be read at the moment." });
  }
}

/**
 * Emits committed records per run: at once after a quiet spell, then gathered, so that a client gets at most
 * one batch every BATCH_MS.
 */
function batchRecords(io: Gateway, feed: RunFeed): () => void {
  const gathering = new Map<string, { records: RunEvent[]; timer: NodeJS.Timeout }>();
  const emit = (runId: string, records: RunEvent[]) => {
    io.to(runRoom(runId)).emit("run:records", { runId, records });
    const timer = setTimeout(() => flush(runId), BATCH_MS);
    gathering.set(runId, { records: [], timer });
  };
  const flush = (runId: string) => {
    const records = gathering.get(runId)?.records ?? [];
    gathering.delete(runId);
    if (records.length > 0) emit(runId, records);
  };
  const stop = feed.onRecords((runId, records) => {
    const gathered = gathering.get(runId);
    if (gathered) gathered.records.push(...records);
    else emit(runId, records);
  });
  return () => {
    stop();
    for (const { timer } of gathering.values()) clearTimeout(timer);
  };
}

function runRoom(runId: string): string {
  return `run:${runId}`;
}

function sessionRoom(sessionId: string): string {
  return `session:${sessionId}`;
}
