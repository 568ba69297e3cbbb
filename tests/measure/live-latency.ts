import { fork } from "node:child_process";
import { createServer, type Server as HttpServer } from "node:http";
import type { AddressInfo } from "node:net";
import { fileURLToPath } from "node:url";
import { Server } from "socket.io";
import { RunFeed } from "@/lib/engine/run-feed";
import { RunRecorder } from "@/lib/engine/run-recorder";
import { ScaledClock } from "@/lib/engine/scaled-clock";
import { openSocketGateway } from "@/lib/server/socket-gateway";
import { ohms } from "@/lib/units/quantities";
import { openTestJournal } from "../support/test-journal";
import { percentile, printFigure } from "./figure";

const WATCHERS = 50;
const READINGS_PER_SECOND = 200;
const SECONDS = 10;
const clock = () => performance.timeOrigin + performance.now();

/** From the moment a reading is noted by the engine to its arrival at 50 watchers, database and batches included; and bare socket.io beside it. */
export async function measureLiveLatency(): Promise<void> {
  const own = await throughStepwell();
  printFigure("reading_to_browser_p50", percentile(own, 0.5), "ms");
  printFigure("reading_to_browser_p99", percentile(own, 0.99), "ms");
  const bare = await throughBareSocketIo();
  printFigure("bare_socket_io_p50", percentile(bare, 0.5), "ms");
  printFigure("bare_socket_io_p99", percentile(bare, 0.99), "ms");
}

async function throughStepwell(): Promise<number[]> {
  const { journal, runId, started, close } = await openTestJournal();
  const feed = new RunFeed();
  const server = await listen();
  const gateway = openSocketGateway({
    server,
    allowedHosts: ["127.0.0.1"],
    feed,
    authenticate: async () => ({ sessionId: "measure", personId: "measure" }),
    isSessionValid: async () => true,
    onSessionRevoked: () => () => undefined,
    snapshots: () => [],
    records: (id, options) => journal.records(id, options),
    onError: (message, error) => process.stderr.write(`${message}: ${String(error)}\n`),
  });
  const recorder = new RunRecorder({
    runId,
    state: started,
    clock: new ScaledClock(),
    append: (id, records) => journal.append(id, records),
    onCommitted: (records) => feed.tellRecords(runId, records),
  });
  const latencies = await withWatchers(server, runId, () => {
    recorder.note({
      type: "reading.taken",
      data: {
        point: 0,
        attempt: 1,
        phase: "settling",
        ohms: ohms(1e9),
        volts: 500,
        amperes: 5e-7,
        flags: [],
        raw: String(clock()),
      },
    });
  });
  await recorder.commit();
  await gateway.close();
  await close();
  return latencies;
}

async function throughBareSocketIo(): Promise<number[]> {
  const server = await listen();
  const io = new Server(server, { serveClient: false });
  const latencies = await withWatchers(server, "", () => io.emit("bare", { sentAt: clock() }));
  await io.close();
  return latencies;
}

async function listen(): Promise<HttpServer> {
  const server = createServer();
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  return server;
}

/** Watchers live in a process of their own, as browsers do, so that their work does not slow the sender. */
async function withWatchers(server: HttpServer, runId: string, send: () => void): Promise<number[]> {
  const url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  const child = fork(fileURLToPath(new URL("watchers.ts", import.meta.url)), [url, String(WATCHERS), runId], {
    execArgv: ["--import", "tsx"],
  });
  const message = () => new Promise<unknown>((resolve) => child.once("message", resolve));
  await message();
  await sendAtRate(send);
  const latencies = message();
  child.send("stop");
  return (await latencies) as number[];
}

async function sendAtRate(send: () => void): Promise<void> {
  const startMs = performance.now();
  for (let sent = 0; sent < READINGS_PER_SECOND * SECONDS; sent += 1) {
    const waitMs = startMs + (sent * 1000) / READINGS_PER_SECOND - performance.now();
    if (waitMs > 0) await new Promise((resolve) => setTimeout(resolve, waitMs));
    send();
  }
  await new Promise((resolve) => setTimeout(resolve, 500));
}
