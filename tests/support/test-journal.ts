import { createRepositories } from "@/lib/data/create-repositories";
import { layDemoRegister } from "@/lib/data/demo/lay-demo-register";
import { openDatabase, type Database } from "@/lib/data/open-database";
import type { JournalRepository } from "@/lib/data/repositories";
import { applyRunEvent } from "@/lib/journal/apply-run-event";
import { emptyRun, type RunState } from "@/lib/journal/run-state";
import { JournalBuilder } from "./journal-builder";
import { temporaryDataFolder } from "./server-process";

export interface TestJournal {
  database: Database;
  journal: JournalRepository;
  runId: string;
  /** The run after its start, with the first point begun. */
  started: RunState;
  close(): Promise<void>;
}

/** A journal on a database of its own, with one run just started. */
export async function openTestJournal(): Promise<TestJournal> {
  const { dataFolder, remove } = temporaryDataFolder();
  const database = await openDatabase(dataFolder);
  const repositories = createRepositories(database);
  await layDemoRegister({ repositories, hashPassword: async () => "not a hash", nowMs: Date.UTC(2026, 11, 1) });
  const [[bench], [unit]] = await Promise.all([repositories.benches.list(), repositories.units.list("")]);
  const runId = crypto.randomUUID();
  await repositories.runs.reserve({ runId, benchId: bench!.id, unitId: unit!.id });
  const { records } = new JournalBuilder().started().pointStarted(0);
  await repositories.journal.append(runId, records);
  return {
    database,
    journal: repositories.journal,
    runId,
    started: records.reduce(applyRunEvent, emptyRun),
    close: async () => {
      await database.close();
      remove();
    },
  };
}
