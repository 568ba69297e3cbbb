import { beforeEach, expect, it, vi } from "vitest";
import { followRun } from "@/lib/client/run-follower";
import { createRunStore, type RunStore } from "@/lib/client/run-store";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import { FakeSocket } from "./fake-socket";
import { foldAll, sampleJournal } from "./sample-journal";

const records = sampleJournal();
let socket: FakeSocket;
let store: RunStore;
let wake: () => void;
let refused: string[];

beforeEach(() => {
  socket = new FakeSocket();
  store = createRunStore(emptyRun);
  refused = [];
});

function follow(fetchState: () => Promise<RunState> = () => Promise.reject(new Error("not asked for"))) {
  return followRun({
    runId: "run-1",
    store,
    socket: socket.asFollowSocket(),
    onWake: (listener) => {
      wake = listener;
      return () => (wake = () => undefined);
    },
    fetchState,
    onRefused: (message) => refused.push(message),
  });
}

it("asks from the last record it holds, at the start and on every connect", () => {
  store.getState().receive(records.slice(0, 10));
  follow();
  socket.asked[0]!.reply({ kind: "records", records: records.slice(10, 20) });
  socket.hear("connect");
  expect(socket.asked.map(({ afterSeq }) => afterSeq)).toEqual([10, 20]);
});

it("waits for the connection before it asks", () => {
  socket.connected = false;
  follow();
  expect(socket.asked).toEqual([]);
  socket.connected = true;
  socket.hear("connect");
  expect(socket.asked).toHaveLength(1);
});

it("asks again when the page wakes", () => {
  follow();
  wake();
  expect(socket.asked).toHaveLength(2);
});

it("heals a gap with one question, however many batches come meanwhile", () => {
  follow();
  socket.asked[0]!.reply({ kind: "records", records: records.slice(0, 10) });
  socket.hear("run:records", { runId: "run-1", records: records.slice(15, 18) });
  socket.hear("run:records", { runId: "run-1", records: records.slice(18, 25) });
  expect(socket.asked.map(({ afterSeq }) => afterSeq)).toEqual([0, 10]);
  socket.asked[1]!.reply({ kind: "records", records: records.slice(10, 25) });
  expect(store.getState().run).toEqual(foldAll(records.slice(0, 25)));
});

it("leaves records of other runs alone", () => {
  follow();
  socket.hear("run:records", { runId: "run-2", records: records.slice(0, 5) });
  expect(store.getState().run).toBe(emptyRun);
});

it("fetches the whole state when told to, and asks for what came meanwhile", async () => {
  const fetchState = vi.fn(() => Promise.resolve(foldAll(records.slice(0, 40))));
  follow(fetchState);
  socket.asked[0]!.reply({ kind: "reload" });
  socket.hear("run:records", { runId: "run-1", records: records.slice(40, 42) });
  await vi.waitFor(() => expect(socket.asked).toHaveLength(2));
  expect(fetchState).toHaveBeenCalledTimes(1);
  expect(socket.asked[1]!.afterSeq).toBe(40);
  socket.asked[1]!.reply({ kind: "records", records: records.slice(40, 42) });
  expect(store.getState().run).toEqual(foldAll(records.slice(0, 42)));
});

it("passes on why it was refused", () => {
  follow();
  socket.asked[0]!.reply({ kind: "refused", message: "This is not a run to follow." });
  expect(refused).toEqual(["This is not a run to follow."]);
});

it("hears nothing more after its end", () => {
  const end = follow();
  end();
  socket.hear("run:records", { runId: "run-1", records });
  socket.asked[0]!.reply({ kind: "records", records });
  expect(store.getState().run).toBe(emptyRun);
  expect(socket.unfollowed).toEqual(["run-1"]);
});
