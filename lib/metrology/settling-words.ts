import { formatDuration, formatOhms } from "@/lib/units/format";
import type { UntilSteady } from "@/lib/schemas/settling";

/** What keeps a point from counting as settled. */
export type MissingCondition = "least-wait" | "window" | "hold" | "drift" | "spread" | "approach";

/** How a fixed or scaled wait stands. */
export function waitingSentence(waitSeconds: number, elapsedSeconds: number, isOver: boolean): string {
  return isOver
    ? `Waited ${formatDuration(elapsedSeconds)}`
    : `Waiting ${formatDuration(waitSeconds)}, ${formatDuration(waitSeconds - elapsedSeconds)} to go`;
}

/** What is still missing: `Not settled: needs 3 display updates and drift under 0.5 % a minute`. */
export function missingSentence(
  missing: readonly MissingCondition[],
  policy: UntilSteady,
  expectedOhms: number | null,
): string {
  const needs = missing.filter((condition) => condition !== "approach").map((condition) => needOf(condition, policy));
  const heading = expectedOhms === null ? "still moving" : `still heading for ${formatOhms(expectedOhms)}`;
  if (needs.length === 0) return `Not settled: ${heading}`;
  const list = needs.length === 1 ? needs[0] : `${needs.slice(0, -1).join(", ")} and ${needs.at(-1)}`;
  return `Not settled: ${missing.includes("approach") ? `${heading}, ` : ""}needs ${list}`;
}

function needOf(condition: Exclude<MissingCondition, "approach">, policy: UntilSteady): string {
  switch (condition) {
    case "least-wait":
      return `at least ${formatDuration(policy.leastSeconds)}`;
    case "window":
      return `${policy.displayUpdates} display updates`;
    case "hold":
      return "three of its display steps without change";
    case "drift":
      return `drift under ${policy.driftPercentPerMinute} % a minute`;
    case "spread":
      return `spread under ${policy.spreadPercent} %`;
  }
}

export function settledSentence(elapsedSeconds: number): string {
  return `Settled after ${formatDuration(elapsedSeconds)}`;
}

export function unsettledSentence(policy: UntilSteady): string {
  return `Unsettled: not steady within ${formatDuration(policy.mostSeconds)}`;
}

export function overRangeSentence(elapsedSeconds: number, isSettled: boolean): string {
  return isSettled
    ? `Over range, steady after ${formatDuration(elapsedSeconds)}`
    : "Not settled: the display is over its range";
}
