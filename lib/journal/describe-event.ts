import type { RunEvent, RunEventData, Judgement } from "@/lib/schemas/run-event";
import {
  formatDuration,
  formatErrorPercent,
  formatExactDuration,
  formatOhms,
  formatTerminalVolts,
  formatTestVolts,
} from "@/lib/units/format";
import type { JournalLine } from "./run-state";

type Setup = RunEventData<"run.started"> | null;
type Words = Pick<JournalLine, "text" | "tone">;

/** One journal record in the words of the trade. `setup` gives the points their resistance and voltage. */
export function describeEvent(event: RunEvent, setup: Setup): Words {
  switch (event.type) {
    case "run.started":
      return person(`${event.data.by.name} started the run: ${event.data.plan.points.length} points`);
    case "point.started":
      return plain(`${pointName(setup, event.data.point)}${again(event.data.attempt)}`);
    case "output.off-proven":
      return plain(`Output off, terminals at ${formatTerminalVolts(event.data.terminalVolts)}`);
    case "dials.set":
      return plain(`Dials ${formatOhms(event.data.nominalOhms)} set and read back`);
    case "voltage.selected":
      return plain(`${formatTestVolts(event.data.testVolts)} selected and read back`);
    case "output.switching-on":
      return plain(`Switching the output on at ${formatTestVolts(event.data.testVolts)}`);
    case "output.switched-on":
      return plain(`Output on, terminals at ${formatTerminalVolts(event.data.terminalVolts)}`);
    case "reading.taken":
      return plain(event.data.ohms === null ? "Over range" : formatOhms(event.data.ohms));
    case "point.settled":
      return plain(`Settled after ${formatDuration(event.data.settlingSeconds)}`);
    case "point.unsettled":
      return { text: `Not settled after ${formatDuration(event.data.waitedSeconds)}`, tone: "unsettled" };
    case "point.judged":
      return describeJudgement(pointName(setup, event.data.point), event.data.judgement);
    case "point.skipped":
      return person(`${event.data.by.name} skipped ${pointName(setup, event.data.point)}`);
    case "point.abandoned":
      return {
        text: `${pointName(setup, event.data.point)} to be measured again: ${event.data.reason}`,
        tone: "trouble",
      };
    case "output.unproven":
      return { text: `Output not proven off: ${event.data.reason}`, tone: "trouble" };
    case "device.recovered":
      return { text: `${event.data.message} It answered at try ${event.data.tries}.`, tone: "trouble" };
    case "run.held":
      return person(`${event.data.by.name} held the run${because(event.data.reason)}`);
    case "run.resumed":
      return person(`${event.data.by.name} resumed the run`);
    case "run.faulted":
      return { text: `${event.data.message} ${event.data.cure}`, tone: "trouble" };
    case "run.interrupted":
      return { text: event.data.reason, tone: "trouble" };
    case "run.stopped":
      return person(`${event.data.by.name} stopped the run${because(event.data.reason)}`);
    case "run.finished":
      return plain(`Finished after ${formatExactDuration(event.elapsedMs / 1000)}: ${event.data.judged} points judged`);
  }
}

function describeJudgement(name: string, judgement: Judgement): Words {
  const error = judgement.errorPercent === null ? "over range" : `${formatErrorPercent(judgement.errorPercent)} %`;
  const tone = judgement.verdict === "not-stated" ? "plain" : judgement.verdict;
  return { text: `${name}: ${error}, ${verdictWord(judgement.verdict)}`, tone };
}

/** A verdict as the word that people read. */
export function verdictWord(verdict: Judgement["verdict"]): string {
  return verdict === "not-stated" ? "no limit stated" : verdict;
}

/** A point in words: `10.00 GΩ at 500 V`. */
export function pointName(setup: Setup, index: number): string {
  const point = setup?.plan.points[index];
  return point ? `${formatOhms(point.nominalOhms)} at ${formatTestVolts(point.testVolts)}` : `point ${index + 1}`;
}

function again(attempt: number): string {
  return attempt > 1 ? `, attempt ${attempt}` : "";
}

function because(reason: string | null): string {
  return reason ? `: ${reason}` : "";
}

function plain(text: string): Words {
  return { text, tone: "plain" };
}

function person(text: string): Words {
  return { text, tone: "person" };
}
