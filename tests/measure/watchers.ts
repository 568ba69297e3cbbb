// Child process: many socket.io clients in one place. Prints one JSON array of latencies when told to stop.
import { io } from "socket.io-client";

const [url = "", watchers = "50", runId = ""] = process.argv.slice(2);
const latencies: number[] = [];
const clock = () => performance.timeOrigin + performance.now();

interface Stamped {
  sentAt: number;
}

let connected = 0;
const sockets = Array.from({ length: Number(watchers) }, () => {
  const socket = io(url, {
    transports: ["websocket"],
    forceNew: true,
    extraHeaders: { Origin: url, Cookie: "watcher" },
  });
  socket.on("connect", () => {
    if (runId) socket.emit("run:follow", { runId, afterSeq: 0 }, ready);
    else ready();
  });
  socket.on("run:records", ({ records }: { records: { data: { raw?: string } }[] }) => {
    const now = clock();
    for (const record of records) if (record.data.raw) latencies.push(now - Number(record.data.raw));
  });
  socket.on("bare", ({ sentAt }: Stamped) => latencies.push(clock() - sentAt));
  return socket;
});

function ready(): void {
  connected += 1;
  if (connected === sockets.length) process.send?.("ready");
}

process.on("message", () => {
  for (const socket of sockets) socket.disconnect();
  process.send?.(latencies, () => process.exit(0));
});
