import { renderToStaticMarkup } from "react-dom/server";
import { expect, it } from "vitest";
import { RunNotices } from "@/components/run-views/run-notices";
import type { RunState } from "@/lib/journal/run-state";
import { foldAll, sampleJournal } from "./sample-journal";

const records = sampleJournal();
const interruptedAt = records.find((record) => record.type === "run.interrupted")!.seq;
const interrupted = foldAll(records.slice(0, interruptedAt));
const faulted: RunState = {
  ...interrupted,
  status: "faulted",
  interruption: null,
  trouble: {
    code: "no-answer",
    message: "The tester did not answer.",
    cure: "Check its power and cable, then resume.",
  },
};

function wordsOf(state: RunState, canResume = true, failure: string | null = null): string {
  const room = { celsius: 19.1, humidityPercent: 40 };
  return renderToStaticMarkup(
    <RunNotices runId="run-1" state={state} room={room} canResume={canResume} failure={failure} />,
  ).replaceAll(/<[^>]+>/g, " ");
}

it("tells the cure of a fault, the room that has cooled, and what Resume measures", () => {
  const words = wordsOf(faulted);
  expect(words).toContain("Check its power and cable, then resume.");
  expect(words).toContain("colder than at the start");
  expect(words).toMatch(/Resume measures 5\.000\s?MΩ at 100\s?V next, as attempt 2\./);
});

it("sends a person who may not resume to somebody who may", () => {
  const words = wordsOf(interrupted, false);
  expect(words).toContain("A technician or an engineer can resume it.");
  expect(words).not.toContain("Resume measures");
});

it("says that a run is over and offers its results", () => {
  expect(wordsOf(foldAll(records))).toMatch(/The run is over\..*1 of 4 points outside.*Results/s);
});

it("says nothing of a run that goes on, but why a command failed", () => {
  const running = foldAll(records.slice(0, 20));
  expect(wordsOf(running).trim()).toBe("");
  expect(wordsOf(running, true, "Not held. The server did not answer.")).toContain("Not held.");
});
