import { expect, it } from "vitest";
import { createReplayStore } from "@/lib/client/replay-store";
import { pointSpans } from "@/lib/client/replay-stops";
import { createTimeline } from "@/lib/client/replay-timeline";
import { sampleJournal, toColumns } from "./sample-journal";

const records = sampleJournal();
const columns = toColumns(records);

function replayAt(seq: number) {
  const timeline = createTimeline(columns);
  return createReplayStore(timeline, pointSpans(columns.events, timeline.lastSeq), seq);
}

it("begins at the moment of the link, or at the nearest end of the journal", () => {
  expect(replayAt(17).getState().seq).toBe(17);
  expect(replayAt(-5).getState().seq).toBe(1);
  expect(replayAt(1e6).getState().seq).toBe(records.length);
});

it("stands still until it is played", () => {
  const replay = replayAt(10);
  replay.getState().tick(60_000);
  expect(replay.getState().seq).toBe(10);
});

it("plays at its speed and stops by itself at the end", () => {
  const replay = replayAt(1);
  replay.getState().setSpeed(60);
  replay.getState().togglePlay();
  replay.getState().tick(16);
  expect(replay.getState().elapsedMs).toBe(960);
  for (let frame = 0; frame < 2000 && replay.getState().isPlaying; frame += 1) replay.getState().tick(100);
  expect(replay.getState()).toMatchObject({ seq: records.length, isPlaying: false });
});

it("plays from the beginning again after its end", () => {
  const replay = replayAt(records.length);
  replay.getState().togglePlay();
  expect(replay.getState()).toMatchObject({ seq: 1, isPlaying: true });
});

it("stays where it is when no point outside follows", () => {
  const replay = replayAt(records.length);
  replay.getState().nextOutside();
  expect(replay.getState().seq).toBe(records.length);
});
