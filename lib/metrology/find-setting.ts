import type { DecadeBoxRecord } from "@/lib/schemas/instrument";
import { formatOhms } from "@/lib/units/format";
import { expandedUncertaintyOhms, nominalOhmsOf, type SetDecade } from "./decades";
import { MetrologyError, requireNonNegative, requirePositive } from "./metrology-error";
import { checkRating, decadeStresses, isBeyondRating } from "./ratings";

/** A setting, or why there is none: nothing that the dials make is near enough, or the ratings forbid what is. */
export type FoundSetting =
  { ok: true; positions: number[] } | { ok: false; cause: "setting" | "rating"; reason: string };

/** How far a setting's nominal value may lie from the wanted one, as a fraction of it. */
export const NEAR_ENOUGH = 0.01;

interface Candidate {
  positions: number[];
  /** Distance from the wanted value in smallest steps. */
  error: number;
  uncertaintyOhms: number;
}

interface Search {
  box: DecadeBoxRecord;
  stepOhms: number;
  /** Smallest steps in one position of each decade. */
  weights: number[];
  /** Smallest steps that the decades lighter than each one can add together. */
  reaches: number[];
  wanted: number;
  /** Null leaves ratings out of account. */
  highestVolts: number | null;
  best: Candidate | null;
  /** Settings farther from the wanted value do not count; shrinks as better ones are found. */
  farthest: number;
}

/**
 * The setting of a box that makes `wantedOhms`: the least error of the nominal value that the ratings allow with
 * `highestVolts` across the box, and among equals the least uncertainty.
 *
 * Shape: ohms above zero, volts -> positions from the heaviest decade to the lightest, or a cause and its reason in
 * words. Settings farther than NEAR_ENOUGH from the wanted value do not count.
 * Throws MetrologyError for inputs that are not finite or not positive, and for a box whose steps are not whole
 * multiples of its smallest one.
 */
export function findSetting(box: DecadeBoxRecord, wantedOhms: number, highestVolts: number): FoundSetting {
  requirePositive("wantedOhms", wantedOhms);
  requireNonNegative("highestVolts", highestVolts);
  const nearest = search(box, wantedOhms, null);
  if (!nearest) return { ok: false, cause: "setting", reason: describeReach(box, wantedOhms) };
  if (checkRating(box, nearest, highestVolts) === null) return { ok: true, positions: nearest };
  const allowed = highestVolts > box.ratedVolts ? null : search(box, wantedOhms, highestVolts);
  if (allowed && checkRating(box, allowed, highestVolts) === null) return { ok: true, positions: allowed };
  return { ok: false, cause: "rating", reason: checkRating(box, nearest, highestVolts)! };
}

function search(box: DecadeBoxRecord, wantedOhms: number, highestVolts: number | null): number[] | null {
  const stepOhms = Math.min(...box.decades.map((decade) => decade.stepOhms));
  const weights = box.decades.map((decade, index) => requireMultiple(decade.stepOhms, stepOhms, index));
  const reaches = weights.map((_, index) =>
    box.decades
      .slice(index + 1)
      .reduce((sum, decade, below) => sum + decade.highestPosition * weights[index + 1 + below]!, 0),
  );
  const wanted = wantedOhms / stepOhms;
  const state: Search = {
    ...{ box, stepOhms, weights, reaches, wanted, highestVolts },
    best: null,
    farthest: wanted * NEAR_ENOUGH * (1 + 1e-12),
  };
  descend(state, [], 0);
  return state.best?.positions ?? null;
}

/** Tries the positions of the next decade, nearest first, and leaves out whatever cannot beat the best setting so far. */
function descend(state: Search, positions: number[], units: number): void {
  const index = positions.length;
  const decade = state.box.decades[index];
  if (!decade) return keepIfBetter(state, positions, units);
  const choices = Array.from({ length: decade.highestPosition + 1 }, (_, position) => {
    const sum = units + position * state.weights[index]!;
    return { position, sum, error: distance(state.wanted, sum, sum + state.reaches[index]!) };
  }).sort((a, b) => a.error - b.error);
  for (const { position, sum, error } of choices) {
    if (error > state.farthest) return;
    const chosen = [...positions, position];
    if (canWithstand(state, chosen, sum + state.reaches[index]!)) descend(state, chosen, sum);
  }
}

/** Whether the decades chosen so far would stand the voltage if the whole setting were as large as it still can be. */
function canWithstand(state: Search, positions: readonly number[], mostUnits: number): boolean {
  const { highestVolts, box, stepOhms } = state;
  if (highestVolts === null) return true;
  const mostOhms = Math.min(mostUnits, state.wanted + state.farthest) * stepOhms;
  return positions.every((position, index) => {
    const decade = box.decades[index]!;
    const chosen: SetDecade = { decade, position, nominalOhms: position * decade.stepOhms };
    return !decadeStresses(chosen, mostOhms, highestVolts).some(isBeyondRating);
  });
}

function keepIfBetter(state: Search, positions: number[], units: number): void {
  const error = Math.abs(units - state.wanted);
  const uncertaintyOhms = expandedUncertaintyOhms(state.box, positions);
  const best = state.best;
  if (best && (error > best.error || (error === best.error && uncertaintyOhms >= best.uncertaintyOhms))) return;
  state.best = { positions, error, uncertaintyOhms };
  state.farthest = error;
}

function distance(value: number, from: number, to: number): number {
  return Math.max(0, from - value, value - to);
}

function requireMultiple(ohms: number, stepOhms: number, index: number): number {
  const weight = Math.round(ohms / stepOhms);
  if (Math.abs(ohms / stepOhms - weight) > 1e-6) {
    throw new MetrologyError(`decades[${index}].stepOhms`, "must be a whole multiple of the smallest step");
  }
  return weight;
}

function describeReach(box: DecadeBoxRecord, wantedOhms: number): string {
  const most = nominalOhmsOf(
    box,
    box.decades.map((decade) => decade.highestPosition),
  );
  const least = Math.min(...box.decades.map((decade) => decade.stepOhms));
  return `${box.model} makes ${formatOhms(least)} to ${formatOhms(most)} and no setting within 1 % of ${formatOhms(wantedOhms)}`;
}
