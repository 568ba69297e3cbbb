import type { TraceSample } from "@/lib/journal/run-state";
import { engineeringParts, formatOhms } from "@/lib/units/format";

/** Everything that the trace of one point shows. Resistances in ohms, times in seconds since the output was switched on. */
export interface PointTraceData {
  samples: readonly TraceSample[];
  standardOhms: number | null;
  /** Half-width of the tolerance band around the standard's value; null where nothing is stated. */
  limitOhms: number | null;
  /** Value that the trace is heading for; null when nothing can be said. */
  expectedOhms: number | null;
  /** Time constant of that approach. */
  fittedSeconds: number | null;
  /** Start of the window in which steadiness is watched. */
  windowFromSeconds: number | null;
  /** Least step of the display here, for the digits of the labels. */
  resolutionOhms?: number;
}

export interface OhmScale {
  /** Ohms to one of the axis' unit. */
  factor: number;
  unit: string;
}

/** The prefixed unit of the axis, from the value that the trace is about. */
export function ohmScale({ standardOhms, samples }: PointTraceData): OhmScale {
  const value = standardOhms ?? samples.findLast((sample) => sample.ohms !== null)?.ohms ?? 1;
  const { unit } = engineeringParts(value, "Ω");
  const power = Math.min(12, Math.max(-3, Math.floor(Math.log10(Math.max(value, 1e-3)) / 3 + 1e-9) * 3));
  return { factor: 10 ** power, unit };
}

/**
 * Range of the resistance axis: the tolerance band, the latest value, and as much of the approach as leaves both legible.
 */
export function ohmRange({ samples, standardOhms, limitOhms, expectedOhms }: PointTraceData): [number, number] {
  const known = samples.flatMap((sample) => (sample.ohms === null ? [] : [sample.ohms]));
  const centre = standardOhms ?? known.at(-1) ?? 1;
  const reach = Math.max(3 * (limitOhms ?? 0), 0.3 * centre);
  const near = known.filter((ohms) => Math.abs(ohms - centre) <= reach);
  const shown = [
    ...near,
    ...known.slice(-1),
    ...(limitOhms === null ? [centre] : [centre - limitOhms, centre + limitOhms]),
    ...(expectedOhms !== null && Math.abs(expectedOhms - centre) <= 2 * reach ? [expectedOhms] : []),
  ];
  const low = Math.min(...shown);
  const high = Math.max(...shown);
  const pad = 0.08 * (high - low) || 0.05 * centre;
  return [Math.max(0, low - pad), high + pad];
}

/** The approach to the expected end from the latest value on, by its time constant: R_end + (R − R_end)·e^(−t/τ). */
export function expectedCurve(data: PointTraceData, untilSeconds: number): [seconds: number, ohms: number][] {
  const last = data.samples.findLast((sample) => sample.ohms !== null);
  if (data.expectedOhms === null || !last || last.ohms === null) return [];
  const end = data.expectedOhms;
  const away = last.ohms - end;
  const tau = data.fittedSeconds;
  const span = untilSeconds - last.seconds;
  return Array.from({ length: 25 }, (_, index) => {
    const passed = (span * index) / 24;
    return [last.seconds + passed, tau ? end + away * Math.exp(-passed / tau) : end];
  });
}

/** The trace in words. */
export function describeTrace(data: PointTraceData): string {
  const first = data.samples.find((sample) => sample.ohms !== null);
  const last = data.samples.at(-1);
  if (!last) return "No reading yet.";
  const digits = data.resolutionOhms;
  return [
    `Indication over ${last.seconds.toFixed(0)} s since the output was switched on:`,
    first && first.ohms !== null && `from ${formatOhms(first.ohms, digits)}`,
    last.ohms === null ? "now over range;" : `to ${formatOhms(last.ohms, digits)};`,
    data.standardOhms !== null && `standard ${formatOhms(data.standardOhms)};`,
    data.limitOhms !== null && `limits ±${formatOhms(data.limitOhms)};`,
    data.expectedOhms !== null && `expected to end at ${formatOhms(data.expectedOhms, digits)}.`,
  ]
    .filter(Boolean)
    .join(" ");
}
