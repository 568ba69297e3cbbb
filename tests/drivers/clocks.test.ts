import { describe, expect, it } from "vitest";
import type { Clock } from "@/lib/engine/clock";
import { ScaledClock } from "@/lib/engine/scaled-clock";
import { VirtualClock } from "@/lib/engine/virtual-clock";
import { seededRandom } from "../support/seeded-random";

const makers: [string, () => Clock][] = [
  ["virtual clock", () => new VirtualClock({ startMs: 0 })],
  ["clock at 1000 times", () => new ScaledClock(1000)],
];

describe.each(makers)("%s", (_name, makeClock) => {
  it("wakes no sleeper before its time", async () => {
    const clock = makeClock();
    for (const ms of [0, 1, 700, 1300, 12_700]) {
      const beganMs = clock.monotonicMs();
      await clock.sleep(ms);
      expect(clock.monotonicMs() - beganMs).toBeGreaterThanOrEqual(ms);
    }
  });

  it("wakes sleepers in the order of their times", async () => {
    const clock = makeClock();
    const woken: number[] = [];
    await Promise.all([60_000, 15_000, 30_000].map((ms) => clock.sleep(ms).then(() => woken.push(ms))));
    expect(woken).toEqual([15_000, 30_000, 60_000]);
  });

  it("gives up a sleep with the signal's reason, before or during it", async () => {
    const clock = makeClock();
    const reason = new Error("enough");
    await expect(clock.sleep(1000, AbortSignal.abort(reason))).rejects.toBe(reason);
    const controller = new AbortController();
    const sleeping = clock.sleep(3_600_000, controller.signal);
    controller.abort(reason);
    await expect(sleeping).rejects.toBe(reason);
    expect(clock.monotonicMs()).toBeLessThan(3_600_000);
  });

  it("does not call back what was cancelled", async () => {
    const clock = makeClock();
    const called: string[] = [];
    const cancelSchedule = clock.schedule(100, () => called.push("schedule"));
    const cancelDeadline = clock.deadline(1, () => called.push("deadline"));
    cancelSchedule();
    cancelDeadline();
    await clock.sleep(5000);
    expect(called).toEqual([]);
  });

  it("passes on the outcome of held work", async () => {
    const clock = makeClock();
    await expect(clock.hold(Promise.resolve(7))).resolves.toBe(7);
    await expect(clock.hold(Promise.reject(new Error("disk full")))).rejects.toThrow("disk full");
  });
});

describe("virtual clock", () => {
  it("jumps to the next wake-up instead of waiting", async () => {
    const clock = new VirtualClock({ startMs: 1_000_000 });
    await clock.sleep(12 * 3_600_000);
    expect(clock.monotonicMs()).toBe(12 * 3_600_000);
    expect(clock.nowMs()).toBe(1_000_000 + 12 * 3_600_000);
  });

  it("stands still while real work is held", async () => {
    const clock = new VirtualClock({ startMs: 0 });
    let elapsedAfterWork = -1;
    const work = new Promise<void>((resolve) => setTimeout(resolve, 20)).then(() => {
      elapsedAfterWork = clock.monotonicMs();
    });
    const sleeping = clock.sleep(50);
    await clock.hold(work);
    await sleeping;
    expect(elapsedAfterWork).toBe(0);
    expect(clock.monotonicMs()).toBe(50);
  });

  it("takes the same course each time, with sleepers that start further ones", async () => {
    const course = async () => {
      const clock = new VirtualClock({ startMs: 0 });
      const random = seededRandom(3);
      const log: string[] = [];
      const walk = async (name: string) => {
        for (let step = 0; step < 200; step += 1) {
          await clock.sleep(Math.floor(random() * 50));
          log.push(`${name}${clock.monotonicMs()}`);
        }
      };
      await Promise.all(["a", "b", "c"].map(walk));
      return log;
    };
    const first = await course();
    expect(first).toHaveLength(600);
    expect(await course()).toEqual(first);
  });

  it("wakes sleepers of the same time in the order in which they lay down", async () => {
    const clock = new VirtualClock({ startMs: 0 });
    const woken: number[] = [];
    await Promise.all(Array.from({ length: 100 }, (_, index) => clock.sleep(10).then(() => woken.push(index))));
    expect(woken).toEqual(Array.from({ length: 100 }, (_, index) => index));
  });

  it("lets a callback finish what it starts, several event loop turns deep, before time goes on", async () => {
    const clock = new VirtualClock({ startMs: 0 });
    const seen: number[] = [];
    clock.schedule(10, () => {
      setImmediate(() =>
        setImmediate(() => process.nextTick(() => void Promise.resolve().then(() => seen.push(clock.monotonicMs())))),
      );
    });
    await clock.sleep(20);
    expect(seen).toEqual([10]);
  });
});

describe("scaled clock", () => {
  it("runs as many bench seconds in a real one as its speed says", async () => {
    const clock = new ScaledClock(500);
    // Each reading of the bench's time lies between two of the machine's, however busy the machine is.
    const read = () => ({ from: performance.now(), bench: clock.monotonicMs(), to: performance.now() });
    const before = read();
    await clock.sleep(20_000);
    const after = read();
    const elapsedMs = after.bench - before.bench;
    expect(elapsedMs).toBeGreaterThanOrEqual((after.from - before.to) * 500 - 1e-6);
    expect(elapsedMs).toBeLessThanOrEqual((after.to - before.from) * 500 + 1e-6);
  });

  it("goes on without a jump when its speed changes", () => {
    const clock = new ScaledClock(1);
    const beforeMs = clock.monotonicMs();
    clock.setSpeed(1000);
    clock.setSpeed(1);
    const afterMs = clock.monotonicMs();
    expect(afterMs).toBeGreaterThanOrEqual(beforeMs);
    expect(clock.speed).toBe(1);
  });

  it("wakes a sleeper of the slow time early when time is sped up", async () => {
    const clock = new ScaledClock(1);
    const beganMs = clock.monotonicMs();
    const sleeping = clock.sleep(60_000);
    clock.setSpeed(1000);
    await sleeping;
    expect(clock.monotonicMs() - beganMs).toBeGreaterThanOrEqual(60_000);
  });

  it.each([0, 0.5, 1001, Number.NaN])("has no speed of %d", (speed) => {
    expect(() => new ScaledClock(speed)).toThrow(RangeError);
    expect(() => new ScaledClock().setSpeed(speed)).toThrow(RangeError);
  });

  it("leaves deadlines in real time", async () => {
    const clock = new ScaledClock(1000);
    const realMs = performance.now();
    await new Promise<void>((resolve) => clock.deadline(30, resolve));
    // A timer of Node may ring up to a millisecond early.
    expect(performance.now() - realMs).toBeGreaterThanOrEqual(29);
  });
});
