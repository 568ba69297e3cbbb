import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  assess,
  observe,
  startWatch,
  waitSecondsOf,
  type SettlingAssessment,
  type SettlingWatch,
} from "@/lib/metrology/settling";
import { KEPT_SAMPLES } from "@/lib/metrology/settling-trace";
import type { DisplayRange } from "@/lib/schemas/instrument";
import type { SettlingPolicy, UntilSteady } from "@/lib/schemas/settling";
import { seededRandom } from "../support/seeded-random";
import { errorFrom, range } from "./builders";

const GIGA = 1e9;

const steady: UntilSteady = {
  kind: "steady",
  driftPercentPerMinute: 0.5,
  spreadPercent: 0.5,
  displayUpdates: 3,
  leastSeconds: 5,
  mostSeconds: 120,
};

const fine: DisplayRange[] = [range(4 * GIGA, 1e6), range(40 * GIGA, 1e7), range(200 * GIGA, 1e9)];

interface Display {
  policy?: SettlingPolicy;
  ranges?: DisplayRange[];
  plannedSeconds?: number;
  updateSeconds?: number;
  /** What the terminals settle to over time, before the display's step. */
  ohmsAt: (seconds: number) => number;
}

function shown(ohms: number, ranges: readonly DisplayRange[]): number | null {
  const found = ranges.find(({ toOhms }) => ohms <= toOhms);
  return found ? Math.round(ohms / found.resolutionOhms) * found.resolutionOhms : null;
}

/** Watches a display until the detector decides; the assessment at each update. */
function watchUntilDecided({
  policy = steady,
  ranges = fine,
  plannedSeconds = 2,
  updateSeconds = 0.5,
  ohmsAt,
}: Display) {
  let watch = startWatch(policy, plannedSeconds, ranges);
  const course: SettlingAssessment[] = [];
  for (let update = 1; update < 2000; update += 1) {
    const seconds = update * updateSeconds;
    watch = observe(watch, { seconds, ohms: shown(ohmsAt(seconds), ranges) });
    course.push(assess(watch));
    if (course.at(-1)!.state !== "watching") return { course, last: course.at(-1)!, seconds };
  }
  throw new Error("the detector never decided");
}

function rising(endOhms: number, timeConstantSeconds: number) {
  return (seconds: number) => endOhms * (1 - Math.exp(-seconds / timeConstantSeconds));
}

function plain(text: string): string {
  return text.replaceAll("\u2009", " ");
}

describe("a fixed wait", () => {
  const policy = { kind: "fixed", waitSeconds: 3 } as const;

  it("settles when its time is over, whatever the display does", () => {
    const { last, seconds, course } = watchUntilDecided({ policy, ohmsAt: (time) => GIGA * time });
    expect(seconds).toBe(3);
    expect(last).toMatchObject({ state: "settled", progress: 1, secondsToGo: 0 });
    expect(plain(course[1]!.sentence)).toBe("Waiting 3 s, 2 s to go");
  });

  it("settles with the first reading when it waits for nothing", () => {
    expect(watchUntilDecided({ policy: { kind: "fixed", waitSeconds: 0 }, ohmsAt: () => GIGA }).seconds).toBe(0.5);
    expect(assess(startWatch({ kind: "fixed", waitSeconds: 0 }, 1, fine)).state).toBe("watching");
  });
});

describe("a scaled wait", () => {
  it("adds time constants to its base", () => {
    const policy = { kind: "scaled", baseSeconds: 4, timeConstants: 7 } as const;
    expect(waitSecondsOf(policy, 1.5)).toBe(14.5);
    expect(watchUntilDecided({ policy, plannedSeconds: 1.5, ohmsAt: () => GIGA }).seconds).toBe(14.5);
    expect(errorFrom(() => waitSecondsOf(policy, NaN)).field).toBe("timeConstantSeconds");
  });
});

describe("until steady, on a fine display", () => {
  it("takes a rising point when it has come within 0.5 % of its end, not much later", () => {
    const { last, seconds } = watchUntilDecided({ ohmsAt: rising(9.71 * GIGA, 7.4), plannedSeconds: 5 });
    expect(last.state).toBe("settled");
    expect(plain(last.sentence)).toMatch(/^Settled after \d+ s$/u);
    // Within 0.5 % after 7.4 · ln(200) = 39.2 s.
    expect(seconds).toBeGreaterThanOrEqual(7.4 * Math.log(200) - 1);
    expect(seconds).toBeLessThanOrEqual(1.2 * 7.4 * Math.log(200));
  });

  it("foresees end and time constant of 9.71·(1 − exp(−t/7.4)) (metrology.md section 4, computed)", () => {
    const unrounded = [range(40 * GIGA, 1)];
    let watch = startWatch({ ...steady, leastSeconds: 60 }, 5, unrounded);
    for (let seconds = 1; seconds <= 20; seconds += 1) {
      watch = observe(watch, { seconds, ohms: rising(9.71 * GIGA, 7.4)(seconds) });
    }
    const { expectedOhms, expectedUncertaintyOhms, fittedSeconds } = assess(watch);
    expect(Math.abs(expectedOhms! / GIGA - 9.71)).toBeLessThan(3 * (expectedUncertaintyOhms! / GIGA) + 1e-3);
    expect(Math.abs(expectedOhms! / GIGA - 9.71)).toBeLessThan(0.02);
    expect(fittedSeconds!).toBeGreaterThan(7.2);
    expect(fittedSeconds!).toBeLessThan(7.6);
  });

  it("waits its least time for a point that stands still at once", () => {
    expect(watchUntilDecided({ ohmsAt: () => GIGA, plannedSeconds: 0.4 }).seconds).toBe(5);
  });

  it("does not take a slowly rising trace for a steady one", () => {
    // 0.4 % a minute at first sight, but 20 % to go.
    const slow = (seconds: number) => 10 * GIGA * (0.8 + 0.2 * (1 - Math.exp(-seconds / 60)));
    const { last, course } = watchUntilDecided({ ohmsAt: slow, plannedSeconds: 1 });
    expect(last.state).toBe("unsettled");
    expect(course.every(({ state }) => state !== "settled")).toBe(true);
  });

  it("calls a display that keeps drifting unsettled at the greatest wait", () => {
    const { last, seconds } = watchUntilDecided({ ohmsAt: (time) => GIGA * (1 + 0.001 * time) });
    expect(seconds).toBe(120);
    expect(last.state).toBe("unsettled");
    expect(plain(last.sentence)).toBe("Unsettled: not steady within 2 min");
  });

  it("calls a display that jumps about unsettled", () => {
    const random = seededRandom(3);
    expect(watchUntilDecided({ ohmsAt: () => GIGA * (1 + 0.05 * random()) }).last.state).toBe("unsettled");
  });

  it("forgets the course before the last part of the way", () => {
    // Ranging first: half a second of nonsense, then a plain rise.
    const ohmsAt = (seconds: number) => (seconds < 1 ? 0.2 * GIGA : rising(9.71 * GIGA, 2)(seconds - 1));
    const { last, seconds } = watchUntilDecided({ ohmsAt });
    expect(last.state).toBe("settled");
    expect(Math.abs(ohmsAt(seconds) / (9.71 * GIGA) - 1)).toBeLessThan(0.006);
  });
});

describe("until steady, on a coarse display", () => {
  const coarse = [range(200 * GIGA, 5 * GIGA)];

  it("does not take a plateau on the way for the end", () => {
    // Of 93 GΩ the display shows 95; it stands at 90 from 87.5 to 92.5 GΩ.
    const { last, seconds } = watchUntilDecided({
      ranges: coarse,
      ohmsAt: rising(93 * GIGA, 8),
      plannedSeconds: 8,
      updateSeconds: 1,
    });
    expect(last.state).toBe("settled");
    expect(seconds).toBeGreaterThanOrEqual(8 * Math.log(93 / 0.5) - 1);
  });

  it("takes the last plateau before a fixed multiple of its steps is over, where the steps so far tell the end", () => {
    // Of 90.1 GΩ the display shows 90 from 87.5 GΩ on, after 8 · ln(90.1 / 2.6) = 28.4 s.
    const { last, seconds } = watchUntilDecided({
      ranges: coarse,
      ohmsAt: rising(90.1 * GIGA, 8),
      plannedSeconds: 8,
      updateSeconds: 1,
    });
    expect(last.state).toBe("settled");
    expect(seconds).toBeGreaterThanOrEqual(28);
    expect(seconds).toBeLessThanOrEqual(45);
  });
});

describe("a display over its range", () => {
  it("settles there once it has stayed long enough", () => {
    const { last, seconds } = watchUntilDecided({ ohmsAt: () => 500 * GIGA, plannedSeconds: 4 });
    expect(last).toMatchObject({ state: "settled", expectedOhms: null, driftPercentPerMinute: null });
    expect(plain(last.sentence)).toBe("Over range, steady after 22 s");
    expect(seconds).toBeGreaterThan(4 * Math.log(200));
  });

  it("starts afresh when the display comes back into its range", () => {
    const ohmsAt = (seconds: number) => (seconds < 8 ? 500 * GIGA : 9.71 * GIGA);
    const { last, seconds, course } = watchUntilDecided({ ohmsAt });
    expect(course[10]!.sentence).toBe("Not settled: the display is over its range");
    expect(last.state).toBe("settled");
    expect(seconds).toBeGreaterThanOrEqual(9);
  });

  it("is unsettled at the greatest wait when it flickers between value and over range", () => {
    const ohmsAt = (seconds: number) => (Math.round(seconds * 2) % 2 === 0 ? 500 * GIGA : 199 * GIGA);
    expect(watchUntilDecided({ ohmsAt }).last.state).toBe("unsettled");
  });
});

describe("the watch", () => {
  it("is left as it is by a further sample", () => {
    const first = observe(startWatch(steady, 2, fine), { seconds: 1, ohms: GIGA });
    const copy = structuredClone(first);
    observe(first, { seconds: 2, ohms: 2 * GIGA });
    expect(first).toEqual(copy);
  });

  it("keeps its size however long it watches, and stays plain JSON", () => {
    let watch = startWatch(steady, 2, fine);
    for (let update = 1; update <= 5000; update += 1) {
      watch = observe(watch, { seconds: update * 0.3, ohms: GIGA + (update % 7) * 1e6 });
      expect(watch.samples.length).toBeLessThanOrEqual(KEPT_SAMPLES);
    }
    expect(JSON.parse(JSON.stringify(watch))).toEqual(watch);
    expect(watch.samples[0]!.seconds).toBeCloseTo(0.3, 9);
    expect(watch.samples.at(-1)!.seconds).toBeCloseTo(1500, 9);
  });

  it("remembers the steps of the display", () => {
    let watch: SettlingWatch = startWatch(steady, 2, fine);
    const display: [number, number][] = [
      [1, 5],
      [2, 5],
      [3, 6],
      [7, 7],
      [8, 7],
      [9, 8],
      [12, 8],
    ];
    for (const [seconds, gigaohms] of display) watch = observe(watch, { seconds, ohms: gigaohms * GIGA });
    expect(watch).toMatchObject({ lastStepSeconds: 9, longestStepSeconds: 4 });
  });

  it("takes a sample of the same time as a correction of the last", () => {
    let watch = observe(startWatch(steady, 2, fine), { seconds: 1, ohms: GIGA });
    watch = observe(watch, { seconds: 1, ohms: 2 * GIGA });
    expect(watch.samples).toEqual([{ seconds: 1, ohms: 2 * GIGA }]);
  });

  it("says that it waits before there is anything to see", () => {
    expect(assess(startWatch(steady, 2, fine))).toMatchObject({
      state: "watching",
      progress: 0,
      sentence: "Waiting for the first reading",
    });
  });

  it("says what is missing in words", () => {
    let watch = startWatch(steady, 2, fine);
    watch = observe(watch, { seconds: 0.5, ohms: 2 * GIGA });
    expect(plain(assess(watch).sentence)).toMatch(
      /^Not settled: needs at least 5 s, 3 display updates and drift under 0\.5 % a minute$/u,
    );
  });

  it("says the same for the same watch, in bounds and without NaN, whatever the display shows", () => {
    const sample = fc.record({
      pauseSeconds: fc.double({ min: 0.01, max: 20, noNaN: true }),
      ohms: fc.option(fc.oneof(fc.constantFrom(0, 1, GIGA, 2 * GIGA), fc.double({ min: 0, max: 1e15, noNaN: true }))),
    });
    const ranges = fc.constantFrom(fine, [], [range(200 * GIGA, 5 * GIGA)]);
    const planned = fc.double({ min: 0, max: 500, noNaN: true });
    fc.assert(
      fc.property(fc.array(sample, { minLength: 1, maxLength: 40 }), ranges, planned, (samples, known, tau) => {
        let watch = startWatch({ ...steady, mostSeconds: 300 }, tau, known);
        let seconds = 0;
        for (const { pauseSeconds, ohms } of samples) {
          seconds += pauseSeconds;
          watch = observe(watch, { seconds, ohms });
          const assessment = assess(watch);
          expect(assess(structuredClone(watch))).toEqual(assessment);
          for (const [name, value] of Object.entries(assessment)) {
            if (typeof value === "number") expect(value, name).toSatisfy(Number.isFinite);
          }
          expect(assessment.progress).toBeGreaterThanOrEqual(0);
          expect(assessment.progress).toBeLessThanOrEqual(1);
          expect(assessment.sentence).not.toMatch(/NaN|Infinity|undefined|null/u);
        }
      }),
      { numRuns: 60 },
    );
  });

  it("names the input that it cannot use", () => {
    const watch = startWatch(steady, 2, fine);
    for (const seconds of [NaN, Infinity, -1]) {
      expect(errorFrom(() => observe(watch, { seconds, ohms: GIGA }))).toMatchObject({
        name: "MetrologyError",
        field: "seconds",
      });
    }
    for (const ohms of [NaN, Infinity, -1])
      expect(errorFrom(() => observe(watch, { seconds: 1, ohms })).field).toBe("ohms");
    for (const tau of [NaN, Infinity, -1])
      expect(errorFrom(() => startWatch(steady, tau, fine)).field).toBe("timeConstantSeconds");
  });
});
