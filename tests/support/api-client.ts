import { io, type Socket } from "socket.io-client";
import type { RunState } from "@/lib/journal/run-state";
import { mergeColumns } from "@/lib/journal/columns";
import type { JournalColumns } from "@/lib/schemas/journal-columns";
import type { Preflight, RunCommand, StartRun } from "@/lib/schemas/run";
import type { RunEvent } from "@/lib/schemas/run-event";
import type { ClientToServerEvents, FollowReply, ServerToClientEvents } from "@/lib/schemas/socket";

export const DEMO_PASSWORD = "still-water";

/** A signed-in person without a browser: the routes and the socket as the pages use them. */
export class ApiClient {
  private constructor(
    readonly url: string,
    readonly cookie: string,
  ) {}

  static async signIn(url: string, email: string, password = DEMO_PASSWORD): Promise<ApiClient> {
    const response = await fetch(`${url}/api/session`, {
      method: "POST",
      headers: { "Content-Type": "application/json", Origin: url },
      body: JSON.stringify({ email, password }),
    });
    if (!response.ok) throw new Error(`sign-in as ${email}: ${response.status} ${await response.text()}`);
    return new ApiClient(
      url,
      response.headers
        .getSetCookie()
        .map((cookie) => cookie.split(";")[0])
        .join("; "),
    );
  }

  async request(method: string, path: string, body?: unknown): Promise<Response> {
    return fetch(`${this.url}${path}`, {
      method,
      headers: {
        Cookie: this.cookie,
        Origin: this.url,
        ...(body === undefined ? {} : { "Content-Type": "application/json" }),
      },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    });
  }

  async json<T>(method: string, path: string, body?: unknown): Promise<T> {
    const response = await this.request(method, path, body);
    const text = await response.text();
    if (!response.ok) throw new Error(`${method} ${path}: ${response.status} ${text}`);
    return (text ? JSON.parse(text) : undefined) as T;
  }

  /** Starts a run with every caution of its preflight confirmed. */
  async startRun(
    choice: Pick<StartRun, "benchId" | "unitId" | "recipeVersionId">,
    clockSpeed: number,
  ): Promise<string> {
    const preflight = await this.json<Preflight>("POST", "/api/preflight", choice);
    const order = {
      ...choice,
      requestId: crypto.randomUUID(),
      condition: "as-found",
      cautions: preflight.cautions,
      clockSpeed,
    };
    return (await this.json<{ runId: string }>("POST", "/api/runs", order)).runId;
  }

  command(runId: string, kind: RunCommand["kind"]): Promise<void> {
    return this.json("POST", `/api/runs/${runId}/commands`, { id: crypto.randomUUID(), kind, reason: null });
  }

  state(runId: string): Promise<RunState> {
    return this.json("GET", `/api/runs/${runId}/state`);
  }

  async journal(runId: string): Promise<RunEvent[]> {
    return mergeColumns(await this.json<JournalColumns>("GET", `/api/runs/${runId}/journal`));
  }

  /** Follows a run over the socket; `onRecords` gets every record told, in batches. */
  follow(
    runId: string,
    afterSeq: number,
    onRecords: (records: RunEvent[]) => void,
  ): Socket<ServerToClientEvents, ClientToServerEvents> {
    const socket: Socket<ServerToClientEvents, ClientToServerEvents> = io(this.url, {
      transports: ["websocket"],
      reconnection: false,
      forceNew: true,
      extraHeaders: { Cookie: this.cookie, Origin: this.url },
    });
    socket.on("run:records", (message) => {
      if (message.runId === runId) onRecords(message.records);
    });
    socket.on("connect", () =>
      socket.emit("run:follow", { runId, afterSeq }, (reply: FollowReply) => {
        if (reply.kind === "records") onRecords(reply.records);
      }),
    );
    return socket;
  }
}

/** Asks `probe` again and again until it gives a value. Rejects after `timeoutMs`. */
export async function eventually<T>(
  probe: () => Promise<T | undefined | null | false>,
  timeoutMs: number,
  what: string,
): Promise<T> {
  const until = Date.now() + timeoutMs;
  for (;;) {
    const value = await probe();
    if (value) return value;
    if (Date.now() > until) throw new Error(`waited ${timeoutMs} ms in vain: ${what}`);
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}
