import { beforeEach, expect, it, vi } from "vitest";
import { createBenchesStore, followBenches, type BenchesStore } from "@/lib/client/bench-follower";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import { FakeSocket } from "./fake-socket";
import { foldAll, sampleJournal } from "./sample-journal";

const records = sampleJournal();
let socket: FakeSocket;
let store: BenchesStore;

function snapshot(id: string, activeRunId: string | null): BenchSnapshot {
  return {
    id,
    name: id,
    roomName: "Room 2",
    room: null,
    simulated: true,
    activeRunId,
    output: { state: "off", volts: 0 },
    trouble: null,
  };
}

beforeEach(() => {
  socket = new FakeSocket();
  store = createBenchesStore({ benches: [snapshot("north", null), snapshot("window", null)], runs: {} });
});

function follow() {
  return followBenches({
    store,
    socket: socket.asFollowSocket(),
    onWake: () => () => undefined,
    fetchState: () => Promise.resolve(foldAll(records.slice(0, 10))),
    onRefused: () => undefined,
  });
}

it("follows a run that starts on a bench from the state that the server has", async () => {
  follow();
  socket.hear("bench:changed", snapshot("north", "run-1"));
  await vi.waitFor(() => expect(socket.asked).toHaveLength(1));
  expect(socket.asked[0]).toMatchObject({ runId: "run-1", afterSeq: 10 });
  socket.asked[0]!.reply({ kind: "records", records: records.slice(10, 20) });
  expect(store.getState().runs["run-1"]).toEqual(foldAll(records.slice(0, 20)));
});

it("leaves a run that is over", async () => {
  follow();
  socket.hear("bench:changed", snapshot("north", "run-1"));
  await vi.waitFor(() => expect(socket.asked).toHaveLength(1));
  socket.hear("bench:changed", snapshot("north", null));
  expect(socket.unfollowed).toEqual(["run-1"]);
});

it("takes all benches anew on every connect", () => {
  follow();
  socket.hear("connect");
  expect(socket.askedForBenches).toHaveLength(2);
  socket.askedForBenches[1]!([snapshot("north", null)]);
  expect(store.getState().benches.map((bench) => bench.id)).toEqual(["north"]);
});

it("hears nothing more after its end", () => {
  const end = follow();
  end();
  socket.hear("bench:changed", snapshot("north", "run-1"));
  expect(store.getState().benches[0]!.activeRunId).toBeNull();
});
