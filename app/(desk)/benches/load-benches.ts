import { can } from "@/lib/auth/permissions";
import type { RunState } from "@/lib/journal/run-state";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import type { Person } from "@/lib/schemas/person";
import { runQuerySchema, type RunQuery, type RunSummary } from "@/lib/schemas/run";
import { requirePerson } from "@/lib/server/page-guard";
import { getServices } from "@/lib/server/services";

export interface LoadedBenches {
  person: Person;
  benches: BenchSnapshot[];
  runs: Record<string, RunState>;
  outside: { rows: RunSummary[]; total: number };
  latest: { rows: RunSummary[]; total: number };
  canStart: boolean;
  nowMs: number;
}

/** All benches with their active runs, and the kept runs that the page lists. */
export async function loadBenches(): Promise<LoadedBenches> {
  const person = await requirePerson("bench.watch");
  const services = getServices();
  const benches = services.benches.snapshots();
  const [runs, outside, latest] = await Promise.all([
    activeRuns(benches),
    services.repositories.runs.query(queryFor({ status: "finished", outside: "some", pageSize: 5 })),
    services.repositories.runs.query(queryFor({ pageSize: 8 })),
  ]);
  return { person, benches, runs, outside, latest, canStart: can(person, "run.start"), nowMs: Date.now() };
}

async function activeRuns(benches: readonly BenchSnapshot[]): Promise<Record<string, RunState>> {
  const ids = benches.flatMap((bench) => bench.activeRunId ?? []);
  const states = await Promise.all(ids.map((id) => getServices().runs.state(id)));
  return Object.fromEntries(ids.flatMap((id, index) => (states[index] ? [[id, states[index]] as const] : [])));
}

function queryFor(wishes: Partial<RunQuery>): RunQuery {
  return runQuerySchema.parse(wishes);
}
