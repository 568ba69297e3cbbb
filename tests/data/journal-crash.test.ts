import { expect, it } from "vitest";
import { createRepositories } from "@/lib/data/create-repositories";
import { layDemoRegister } from "@/lib/data/demo/lay-demo-register";
import { openDatabase } from "@/lib/data/open-database";
import { temporaryDataFolder } from "../support/server-process";
import { seededRandom } from "../support/seeded-random";
import { startChild } from "./child-process";
import { NOW_MS } from "./test-database";

const ROUNDS = 5;

it("has every acknowledged record after each of several kills, in order and with its chain whole", async () => {
  const { dataFolder, remove } = temporaryDataFolder();
  const random = seededRandom(2);
  await withRepositories(dataFolder, async (repositories) => {
    await layDemoRegister({ repositories, hashPassword: async () => "", nowMs: NOW_MS });
    await repositories.runs.reserve({ runId: "run", benchId: "north", unitId: "tw-0412" });
  });
  let before = 0;
  for (let round = 0; round < ROUNDS; round += 1) {
    const batchSize = 1 + Math.floor(random() * 20);
    const writer = startChild("append-until-killed.ts", dataFolder, "run", String(batchSize));
    await writer.wrote(5 + Math.floor(random() * 60));
    await writer.kill();
    const acknowledged = Number(writer.lines.at(-1));
    await withRepositories(dataFolder, async ({ journal }) => {
      const lastSeq = await journal.lastSeq("run");
      const records = await journal.records("run", { afterSeq: 0, limit: 1_000_000 });
      expect(acknowledged).toBeGreaterThan(before);
      expect(lastSeq).toBeGreaterThanOrEqual(acknowledged);
      expect(records.map(({ seq }) => seq)).toEqual(Array.from({ length: lastSeq }, (_, index) => index + 1));
      expect(await journal.verifyChain("run")).toEqual({ intact: true });
      before = lastSeq;
    });
  }
  remove();
}, 60_000);

async function withRepositories(
  dataFolder: string,
  act: (repositories: ReturnType<typeof createRepositories>) => Promise<void>,
): Promise<void> {
  const database = await openDatabase(dataFolder);
  try {
    await act(createRepositories(database));
  } finally {
    await database.close();
  }
}
