// Appends records to a run, a few a batch, and says after each commit how far it has come.
import { createRepositories } from "@/lib/data/create-repositories";
import { openDatabase } from "@/lib/data/open-database";
import type { RunEvent } from "@/lib/schemas/run-event";
import { readingRecord } from "./any-record";

const [dataFolder, runId, batchSize] = process.argv.slice(2);
const database = await openDatabase(dataFolder!);
const { journal } = createRepositories(database);

for (let seq = (await journal.lastSeq(runId!)) + 1; ; seq += Number(batchSize)) {
  const batch = Array.from({ length: Number(batchSize) }, (_, index) => recordAt(seq + index));
  await journal.append(runId!, batch);
  process.stdout.write(`${seq + batch.length - 1}\n`);
}

function recordAt(seq: number): RunEvent {
  if (seq % 3 !== 0) return readingRecord(seq, { raw: `reading ${seq}` });
  return { ...{ seq, atMs: seq, elapsedMs: seq, type: "output.off-proven" }, data: { terminalVolts: seq } };
}
