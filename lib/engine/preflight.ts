import { statfs } from "node:fs/promises";
import { isDriverError } from "@/drivers/driver-error";
import { planRun } from "@/lib/planning/plan";
import { calibrationCheck, cautionsFor, ratingsCheck, roomCheck } from "@/lib/planning/preflight-checks";
import type { Room } from "@/lib/schemas/bench";
import type { Unit } from "@/lib/schemas/instrument";
import type { Plan } from "@/lib/schemas/plan";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import type { Preflight, PreflightCheck } from "@/lib/schemas/run";
import { formatTerminalVolts } from "@/lib/units/format";
import type { BenchManager } from "./bench-manager";
import { describeTrouble } from "./sequencer";

const LEAST_FREE_BYTES = 200e6;

export interface PreflightResult {
  preflight: Preflight;
  plan: Plan;
  room: Room | null;
}

export interface PreflightOrder {
  manager: BenchManager;
  unit: Unit;
  recipe: RecipeVersion;
  dataFolder: string;
  nowMs: number;
}

/** Asks the devices of a reserved bench and checks register and recipe. Switches nothing on; moves dials only when proven safe. */
export async function runPreflight(order: PreflightOrder): Promise<PreflightResult> {
  const { manager, unit, recipe, nowMs } = order;
  const { bench } = manager;
  const today = new Date(nowMs).toISOString().slice(0, 10);
  const devices = await checkDevices(manager, unit);
  const output = await checkOutput(manager);
  const dials = output.state === "blocked" ? dialsUntouched() : await checkDials(manager);
  const room = await readRoom(manager);
  const plan = planRun({
    document: recipe.document,
    bench,
    model: unit.model,
    room: room ?? { celsius: bench.standard.referenceCelsius, humidityPercent: null },
  });
  const checks = [
    calibrationCheck([bench.standard], today),
    ratingsCheck(plan),
    devices,
    output,
    dials,
    roomCheck(room, bench.roomLimits),
    await checkStorage(order.dataFolder),
  ];
  return { preflight: summarise(checks, plan, room, nowMs), plan, room };
}

function summarise(checks: PreflightCheck[], plan: Plan, room: Room | null, nowMs: number): Preflight {
  return {
    checks,
    cautions: cautionsFor(plan),
    points: plan.points.length,
    excluded: plan.excluded.length,
    forecastSeconds: plan.points.reduce((sum, point) => sum + point.forecastSeconds, 0),
    room,
    checkedAtMs: nowMs,
  };
}

async function checkDevices({ devices }: BenchManager, unit: Unit): Promise<PreflightCheck> {
  return attempt("devices", "Devices answer", async () => {
    await devices.reopen();
    const answers: string[] = [];
    for (const [word, device] of [
      ["box", devices.box],
      ["meter", devices.meter],
      ["room sensor", devices.roomSensor],
    ] as const) {
      const { model, serialNumber } = await device.identify();
      answers.push(`${word} ${model} ${serialNumber}`);
    }
    const tester = await devices.tester.identify();
    if (tester.serialNumber !== unit.serialNumber) {
      return {
        state: "blocked",
        finding: `The tester that answers is ${tester.model} ${tester.serialNumber}, not ${unit.model.model} ${unit.serialNumber}.`,
        cure: "Connect the unit that you chose, or choose the one that is connected.",
      };
    }
    return {
      state: "ready",
      finding: `tester ${tester.model} ${tester.serialNumber}, ${answers.join(", ")}`,
      cure: null,
    };
  });
}

async function checkOutput(manager: BenchManager): Promise<PreflightCheck> {
  return attempt("output", "Output proven off", async () => {
    const trouble = await manager.makeSafe();
    if (trouble) return { state: "blocked", finding: trouble.message, cure: trouble.cure };
    const terminalVolts = manager.snapshot().output.volts ?? 0;
    return { state: "ready", finding: `${formatTerminalVolts(terminalVolts)} at the terminals`, cure: null };
  });
}

async function checkDials(manager: BenchManager): Promise<PreflightCheck> {
  return attempt("dials", "Dials move and read back", async () => {
    const permit = await manager.safeState.reach();
    await manager.devices.box.park(permit);
    const positions = await manager.devices.box.readDials();
    return { state: "ready", finding: `all ${positions.length} decades`, cure: null };
  });
}

function dialsUntouched(): PreflightCheck {
  return {
    id: "dials",
    title: "Dials move and read back",
    state: "blocked",
    finding: "not tried: the output is not proven off",
    cure: "Mend the line above first.",
  };
}

async function readRoom(manager: BenchManager): Promise<Room | null> {
  try {
    return await manager.readRoom();
  } catch (error) {
    // The room check tells the person; anything but a device's silence is a fault of ours.
    if (isDriverError(error)) return null;
    throw error;
  }
}

async function checkStorage(dataFolder: string): Promise<PreflightCheck> {
  const { bavail, bsize } = await statfs(dataFolder);
  const freeBytes = bavail * bsize;
  const finding = `${(freeBytes / 1e9).toFixed(freeBytes < 1e10 ? 1 : 0)} GB free`;
  const isEnough = freeBytes >= LEAST_FREE_BYTES;
  return {
    id: "storage",
    title: "Disk",
    state: isEnough ? "ready" : "blocked",
    finding,
    cure: isEnough ? null : "Free at least 0.2 GB on the disk that holds the data folder.",
  };
}

async function attempt(
  id: PreflightCheck["id"],
  title: string,
  check: () => Promise<Pick<PreflightCheck, "state" | "finding" | "cure">>,
): Promise<PreflightCheck> {
  try {
    return { id, title, ...(await check()) };
  } catch (error) {
    const trouble = describeTrouble(error);
    return { id, title, state: "blocked", finding: trouble.message, cure: trouble.cure };
  }
}
