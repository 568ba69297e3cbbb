import type { BenchDevices } from "@/drivers/bench-devices";
import { DriverError, isDriverError, isWorthRepeating } from "@/drivers/driver-error";
import type { TesterReading } from "@/drivers/tester";
import { judgePoint } from "@/lib/metrology/judgement";
import { assess, observe, startWatch } from "@/lib/metrology/settling";
import type { PlannedPoint } from "@/lib/schemas/plan";
import type { ReadingPhase, RunEventData } from "@/lib/schemas/run-event";
import { formatTerminalVolts, formatTestVolts } from "@/lib/units/format";
import type { Clock } from "./clock";
import type { RunRecorder } from "./run-recorder";
import type { SafeState } from "./safe-state";

export interface PointContext {
  setup: RunEventData<"run.started">;
  devices: BenchDevices;
  safeState: SafeState;
  recorder: RunRecorder;
  clock: Clock;
}

interface Attempt {
  point: PlannedPoint;
  attempt: number;
  signal: AbortSignal;
}

/** The meter is read with every so many readings of the tester: it proves the terminals, it is not judged. */
const READINGS_PER_METER_READING = 4;

/**
 * Measures one point, in the order that keeps dials cold: off and discharged, dials, voltage, on, watch until settled,
 * average, off and discharged, judge.
 *
 * Throws AttemptInterrupted when a person ends the attempt and DriverError when the bench fails; the caller then
 * brings the bench to the safe state.
 */
export async function measurePoint(context: PointContext, attempt: Attempt): Promise<void> {
  const { point, signal } = attempt;
  const id = { point: point.index, attempt: attempt.attempt };
  context.recorder.note({ type: "point.started", data: id });
  await setStandard(context, point, signal);
  await selectVoltage(context, point, signal);
  const onSinceMs = await switchOn(context, point, signal);
  const settled = await watchUntilSettled(context, attempt, onSinceMs);
  const readings = await averageReadings(context, attempt);
  await proveOff(context);
  const judgement = judgePoint({
    point,
    rows: context.setup.unit.model.accuracy,
    ranges: context.setup.unit.model.ranges,
    readings: readings.flatMap((reading) => (reading.ohms === null ? [] : [reading.ohms])),
    overRange: readings.some((reading) => reading.ohms === null),
    settled: settled.isSettled,
    settlingSeconds: settled.seconds,
    rule: context.setup.decisionRule,
    standardOhms: point.standardOhms,
  });
  await context.recorder.record({ type: "point.judged", data: { ...id, judgement } });
}

async function proveOff({ safeState, recorder }: PointContext) {
  const permit = await safeState.reach();
  recorder.note({ type: "output.off-proven", data: { terminalVolts: permit.terminalVolts } });
  return permit;
}

async function setStandard(context: PointContext, point: PlannedPoint, signal: AbortSignal): Promise<void> {
  const permit = await proveOff(context);
  signal.throwIfAborted();
  const move = { positions: point.dials, highestVolts: point.highestVolts, permit };
  await repeatOnce(() => context.devices.box.setDials(move));
  context.recorder.note({
    type: "dials.set",
    data: { positions: point.dials, standardId: point.standardId, nominalOhms: point.nominalOhms },
  });
}

async function selectVoltage(context: PointContext, point: PlannedPoint, signal: AbortSignal): Promise<void> {
  signal.throwIfAborted();
  await repeatOnce(() => context.devices.tester.selectVoltage(point.testVolts));
  context.recorder.note({ type: "voltage.selected", data: { testVolts: point.testVolts } });
}

/** Switches the output on and returns the run time at which it was seen on. The intent is committed first. */
async function switchOn(context: PointContext, point: PlannedPoint, signal: AbortSignal): Promise<number> {
  const { safeState, recorder, devices } = context;
  safeState.revoke();
  await recorder.record({ type: "output.switching-on", data: { testVolts: point.testVolts } });
  signal.throwIfAborted();
  await devices.tester.switchOn();
  const output = await devices.tester.readOutput();
  if (!output.on) {
    throw new DriverError(
      "wrong-read-back",
      devices.tester.name,
      `The tester was told to switch on ${formatTestVolts(point.testVolts)} and reports its output off.`,
      "Look at the tester's display, its leads and its battery, then resume.",
    );
  }
  return recorder.note({ type: "output.switched-on", data: { terminalVolts: output.terminalVolts } }).elapsedMs;
}

interface Settled {
  isSettled: boolean;
  seconds: number;
}

async function watchUntilSettled(context: PointContext, attempt: Attempt, onSinceMs: number): Promise<Settled> {
  const { point } = attempt;
  const { ranges } = context.setup.unit.model;
  let watch = startWatch(point.settling, point.timeConstantSeconds, ranges);
  for (let count = 0; ; count += 1) {
    const reading = await takeReading(context, attempt, "settling", count);
    const seconds = (reading.elapsedMs - onSinceMs) / 1000;
    watch = observe(watch, { seconds, ohms: reading.ohms });
    const { state } = assess(watch);
    if (state === "watching") continue;
    return finishSettling(context, attempt, { isSettled: state === "settled", seconds });
  }
}

function finishSettling({ recorder }: PointContext, { point, attempt }: Attempt, settled: Settled): Settled {
  const id = { point: point.index, attempt };
  if (settled.isSettled) recorder.note({ type: "point.settled", data: { ...id, settlingSeconds: settled.seconds } });
  else recorder.note({ type: "point.unsettled", data: { ...id, waitedSeconds: settled.seconds } });
  return settled;
}

async function averageReadings(context: PointContext, attempt: Attempt): Promise<TesterReading[]> {
  const readings: TesterReading[] = [];
  while (readings.length < attempt.point.readings) {
    readings.push(await takeReading(context, attempt, "averaging", readings.length));
  }
  return readings;
}

/** Waits for the next display update, reads the tester (and now and then the meter) and notes what it said. */
async function takeReading(
  { devices, recorder, clock, setup }: PointContext,
  { point, attempt, signal }: Attempt,
  phase: ReadingPhase,
  count: number,
): Promise<TesterReading & { elapsedMs: number }> {
  await clock.sleep(setup.unit.model.displayUpdateSeconds * 1000, signal);
  const reading = await devices.tester.readResistance();
  const withMeter = count % READINGS_PER_METER_READING === 0;
  const volts = withMeter ? await devices.meter.readVolts() : null;
  const amperes = withMeter ? await devices.meter.readAmperes() : null;
  signal.throwIfAborted();
  if (volts !== null && volts > setup.bench.ratedVolts) throw overvoltage(volts, setup);
  const { elapsedMs } = recorder.note({
    type: "reading.taken",
    data: {
      point: point.index,
      attempt,
      phase,
      ohms: reading.ohms,
      volts,
      amperes,
      flags: reading.ohms === null ? ["over-range"] : [],
      raw: reading.raw,
    },
  });
  return { ...reading, elapsedMs };
}

function overvoltage(volts: number, setup: RunEventData<"run.started">): DriverError {
  return new DriverError(
    "refused",
    setup.bench.name,
    `The terminals of ${setup.bench.name} stand at ${formatTerminalVolts(volts)}, above the bench's rating of ${formatTestVolts(setup.bench.ratedVolts)}.`,
    "Look for the cause before you resume: the tester's output is higher than its model states.",
  );
}

/** Settings are absolute, so one repetition with the output off harms nothing. */
async function repeatOnce(act: () => Promise<void>): Promise<void> {
  try {
    await act();
  } catch (error) {
    const isWrongReadBack = isDriverError(error) && error.code === "wrong-read-back";
    if (!isWorthRepeating(error) && !isWrongReadBack) throw error;
    await act();
  }
}
