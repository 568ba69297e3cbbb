import { readFileSync } from "node:fs";
import path from "node:path";
import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import type { RunEvent } from "@/lib/schemas/run-event";
import { ApiClient, eventually } from "./api-client";
import { startServer, temporaryDataFolder, type ServerProcess } from "./server-process";

export interface CrashReport {
  kills: number;
  /** Records that a follower had been told before a kill, over all kills. */
  acknowledged: number;
  lost: number;
  altered: number;
  /** Places where `seq` does not rise by one. */
  gaps: number;
  /** Restarts whose first setting to the tester was not to switch its output off. */
  notOffFirst: number;
  /** Kills that met the output switched on. */
  killedWithOutputOn: number;
  violations: string[];
  journalLength: number;
  finalState: RunState;
}

export interface CrashOptions {
  kills: number;
  recipeName: string;
  clockSpeed: number;
  /** A number in [0, 1) from a seeded generator. */
  random: () => number;
  longestWaitMs: number;
}

const ENVIRONMENT = { STEPWELL_DEMO: "register" };

/** Kills the server at random moments of one run, starts it again, resumes, and lets the run end; compares journal and acknowledgements. */
export async function crashTrial(options: CrashOptions): Promise<CrashReport> {
  const { dataFolder, remove } = temporaryDataFolder();
  const told = new Map<number, string>();
  const report = { kills: 0, notOffFirst: 0, killedWithOutputOn: 0 };
  let server = await startServer(dataFolder, ENVIRONMENT);
  try {
    let client = await ApiClient.signIn(server.url, "ines.marlow@thornmere.example");
    const { runId, benchId } = await begin(client, options);
    while (report.kills < options.kills) {
      const socket = client.follow(runId, 0, (records) => remember(told, records));
      await pause(options.random() * options.longestWaitMs);
      await server.kill("SIGKILL");
      socket.close();
      report.kills += 1;
      if (readMemory(dataFolder, benchId).isOutputOn) report.killedWithOutputOn += 1;
      server = await startServer(dataFolder, ENVIRONMENT);
      if (!isOffFirst(readMemory(dataFolder, benchId))) report.notOffFirst += 1;
      client = await ApiClient.signIn(server.url, "ines.marlow@thornmere.example");
      const state = await client.state(runId);
      if (state.status === "finished") break;
      await client.command(runId, "resume");
    }
    const finalState = await eventually(
      async () => {
        const state = await client.state(runId);
        return state.status === "finished" && state;
      },
      240_000,
      "the resumed run finishes",
    );
    const journal = await client.journal(runId);
    return { ...report, ...compare(journal, told), violations: readMemory(dataFolder, benchId).violations, finalState };
  } finally {
    await stop(server);
    remove();
  }
}

async function begin(client: ApiClient, { recipeName, clockSpeed }: CrashOptions) {
  const benches = await client.json<{ id: string; name: string }[]>("GET", "/api/benches");
  const units = await client.json<{ id: string; assetNumber: string }[]>("GET", "/api/units?search=0412");
  const recipes = await client.json<{ id: string; document: { name: string } }[]>("GET", "/api/recipes");
  const benchId = benches.find(({ name }) => name === "North bench")!.id;
  const recipeVersionId = recipes.find(({ document }) => document.name === recipeName)!.id;
  const runId = await client.startRun({ benchId, unitId: units[0]!.id, recipeVersionId }, clockSpeed);
  return { runId, benchId };
}

/** The first telling counts: a record that is told otherwise after a restart has been altered. */
function remember(told: Map<number, string>, records: readonly RunEvent[]): void {
  for (const record of records) if (!told.has(record.seq)) told.set(record.seq, JSON.stringify(record));
}

function compare(journal: readonly RunEvent[], told: ReadonlyMap<number, string>) {
  const stored = new Map(journal.map((record) => [record.seq, JSON.stringify(record)]));
  const acknowledged = [...told];
  // Folding proves more than counting: a gap or a doubled record would throw or change the state.
  journal.reduce(applyRunEvent, emptyRun);
  return {
    acknowledged: told.size,
    lost: acknowledged.filter(([seq]) => !stored.has(seq)).length,
    altered: acknowledged.filter(([seq, text]) => stored.has(seq) && stored.get(seq) !== text).length,
    gaps: journal.filter((record, index) => record.seq !== index + 1).length,
    journalLength: journal.length,
  };
}

interface SimulationMemory {
  isOutputOn: boolean;
  /** Settings received since the ports were opened, oldest first. */
  settingsSinceOpen: { role: string; line: string }[];
  violations: string[];
}

function readMemory(dataFolder: string, benchId: string): SimulationMemory {
  return JSON.parse(readFileSync(path.join(dataFolder, "simulation", `${benchId}.json`), "utf8")) as SimulationMemory;
}

function isOffFirst({ isOutputOn, settingsSinceOpen }: SimulationMemory): boolean {
  const first = settingsSinceOpen.find(({ role }) => role === "tester");
  return !isOutputOn && first !== undefined && /^OUTP\w*(:STAT\w*)? (OFF|0)$/iu.test(first.line);
}

async function stop(server: ServerProcess): Promise<void> {
  if (server.child.exitCode === null) await server.kill("SIGTERM");
}

function pause(ms: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, ms));
}
