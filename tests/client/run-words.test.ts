import { expect, it } from "vitest";
import { announcement } from "@/components/run-views/announcement";
import { courseOfRun, journalRows } from "@/components/run-views/course-of-run";
import { roomChange } from "@/components/run-views/room-change";
import { runTimes } from "@/components/run-views/run-times";
import { timeLeft } from "@/lib/journal/selectors";
import { foldAll, sampleJournal, toColumns } from "./sample-journal";

const records = sampleJournal();
const { events } = toColumns(records);

it("says aloud one line per point, and none for readings", () => {
  const said = new Set(records.map((record) => announcement(foldAll(records.slice(0, record.seq)))));
  const points = [...said].filter((text) => text.includes(" at "));
  expect(points.filter((text) => text.includes("%"))).toHaveLength(3);
  expect(said.size).toBeLessThanOrEqual(9);
});

it("tells of the interruption, the resumption, the repeated attempt and the skipped point, and of nothing else", () => {
  expect(courseOfRun(events).map((line) => line.text)).toEqual([
    "The server stopped at point 2.",
    "Ines Marlow resumed the run",
    expect.stringMatching(/attempt 2$/),
    expect.stringMatching(/^Ines Marlow skipped /),
  ]);
});

it("counts the readings between events from their numbers", () => {
  const counted = journalRows(events).reduce((total, row) => total + row.readingsBefore, 0);
  expect(counted).toBe(records.filter((record) => record.type === "reading.taken").length);
});

it("points out a room that has changed by more than 2 °C", () => {
  const start = { celsius: 22.8, humidityPercent: 41 };
  expect(roomChange(start, { celsius: 19.1, humidityPercent: 40 })).toContain("3.7\u2009°C colder");
  expect(roomChange(start, { celsius: 24.7, humidityPercent: 40 })).toBeNull();
  expect(roomChange(start, null)).toBeNull();
});

it("tells what is left in the wall's time when the bench's time runs faster", () => {
  const state = foldAll(records.slice(0, 20));
  const fast = { ...state, setup: { ...state.setup!, clockSpeed: 60 } };
  const left = runTimes(fast, 1_000_000).left!;
  expect(left.seconds).toBeCloseTo(timeLeft(state)!.seconds / 60, 9);
  expect(left.doneAtMs).toBeCloseTo(1_000_000 + left.seconds * 1000, 3);
  expect(runTimes(foldAll(records), 0).left).toBeNull();
  expect(runTimes({ ...fast, status: "held" }, 0).left).toBeNull();
});
