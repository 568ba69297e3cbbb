import { writeFileSync } from "node:fs";
import path from "node:path";
import { QueryTypes, type Transaction } from "sequelize";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { requireNewEnough } from "@/lib/data/check-database";
import { openDatabase } from "@/lib/data/open-database";
import { SiteSettingRow } from "@/models";
import { temporaryDataFolder } from "../support/server-process";
import { startChild } from "./child-process";
import { openTestDatabase, type TestDatabase } from "./test-database";

let opened: TestDatabase;

beforeEach(async () => {
  opened = await openTestDatabase();
});

afterEach(() => opened.close());

/** What the PRAGMAs say on the connection of a transaction, or on the plain one. */
async function readPragmas(transaction: Transaction | null) {
  const names = ["journal_mode", "synchronous", "foreign_keys", "busy_timeout", "trusted_schema", "recursive_triggers"];
  const values: Record<string, unknown> = {};
  for (const name of names) {
    const sql = `PRAGMA ${name}`;
    const [row] = await opened.database.sequelize.query<object>(sql, { type: QueryTypes.SELECT, transaction });
    values[name] = Object.values(row!)[0];
  }
  return values;
}

const expected = {
  journal_mode: "wal",
  // 2 is FULL.
  synchronous: 2,
  foreign_keys: 1,
  busy_timeout: 2000,
  trusted_schema: 0,
  recursive_triggers: 1,
};

describe("every connection", () => {
  it("has the PRAGMAs when it reads", async () => {
    expect(await readPragmas(null)).toEqual(expected);
  });

  it("has the PRAGMAs when it writes", async () => {
    expect(await opened.database.write(readPragmas)).toEqual(expected);
  });

  it("has the PRAGMAs when the writing one had to be opened again", async () => {
    await expect(breakCommit()).rejects.toThrow(/FOREIGN KEY/u);
    expect(await opened.database.write(readPragmas)).toEqual(expected);
  });

  it("has the PRAGMAs when Sequelize opens one for a transaction of its own", async () => {
    expect(await opened.database.sequelize.transaction(readPragmas)).toEqual(expected);
  });
});

describe("writing", () => {
  it("commits 200 writes that begin at once, each seeing the one before", async () => {
    const { database, repositories } = opened;
    await repositories.siteSettings.set("count", "0");
    const addOne = () =>
      database.write(async (transaction) => {
        const row = await SiteSettingRow.findByPk("count", { transaction, rejectOnEmpty: true });
        await row.update({ value: String(Number(row.value) + 1) }, { transaction });
      });
    await Promise.all(Array.from({ length: 200 }, addOne));
    expect(await repositories.siteSettings.get("count")).toBe("200");
  });

  it("takes back what a failed write had done, and goes on", async () => {
    const { database, repositories } = opened;
    const failing = database.write(async (transaction) => {
      await SiteSettingRow.create({ key: "a", value: "1" }, { transaction });
      throw new RangeError("no");
    });
    await expect(failing).rejects.toThrow(RangeError);
    expect(await repositories.siteSettings.get("a")).toBeNull();
    await repositories.siteSettings.set("a", "2");
    expect(await repositories.siteSettings.get("a")).toBe("2");
  });

  it("goes on after a commit that the database refused", async () => {
    await expect(breakCommit()).rejects.toThrow(/FOREIGN KEY/u);
    await opened.repositories.siteSettings.set("a", "1");
    expect(await opened.repositories.siteSettings.get("a")).toBe("1");
    expect(await opened.rows("SELECT * FROM sessions")).toEqual([]);
  });

  it("refuses a write inside a write, which would wait for itself, and takes the next one", async () => {
    const { database, repositories } = opened;
    await expect(database.write(() => repositories.siteSettings.set("a", "1"))).rejects.toThrow(/inside another/u);
    await repositories.siteSettings.set("a", "2");
    expect(await repositories.siteSettings.get("a")).toBe("2");
  });

  it("refuses a statement that comes after the end of its transaction", async () => {
    const { database } = opened;
    const ended = await database.write(async (transaction) => transaction);
    await expect(SiteSettingRow.create({ key: "late", value: "1" }, { transaction: ended })).rejects.toThrow(
      /commit has been called on this transaction/u,
    );
  });
});

/** A session of nobody, which the database finds out at the commit. */
function breakCommit(): Promise<unknown> {
  const { sequelize } = opened.database;
  return opened.database.write(async (transaction) => {
    await sequelize.query("PRAGMA defer_foreign_keys = ON", { transaction });
    await sequelize.query("INSERT INTO sessions VALUES ('hash', 'nobody', 1, 1, 1)", { transaction });
  });
}

describe("opening", () => {
  it("finds what was written before", async () => {
    await opened.repositories.siteSettings.set("site.name", "Thornmere");
    await opened.database.close();
    const again = await openDatabase(opened.dataFolder);
    const sql = "SELECT value FROM site_settings";
    expect(await again.sequelize.query(sql, { type: QueryTypes.SELECT })).toEqual([{ value: "Thornmere" }]);
    await again.close();
    opened = await openTestDatabase();
  });

  it("is refused for a file that is no database, in words, and leaves the folder free", async () => {
    const { dataFolder, remove } = temporaryDataFolder();
    writeFileSync(path.join(dataFolder, "stepwell.sqlite"), "x".repeat(8192));
    for (let tries = 0; tries < 2; tries += 1) {
      await expect(openDatabase(dataFolder)).rejects.toMatchObject({
        name: "DataError",
        code: "database-damaged",
        message: expect.stringMatching(/Restore the latest backup/u) as string,
      });
    }
    remove();
  });

  it("is refused in a folder that this process uses already", async () => {
    await expect(openDatabase(opened.dataFolder)).rejects.toMatchObject({
      code: "database-in-use",
      message: expect.stringContaining(`process ${process.pid}`) as string,
    });
  });

  it("is refused while another process lives, and possible once that one is killed", async () => {
    const { dataFolder, remove } = temporaryDataFolder();
    const other = startChild("hold-folder.ts", dataFolder);
    await other.wrote(1);
    await expect(openDatabase(dataFolder)).rejects.toMatchObject({
      code: "database-in-use",
      message: expect.stringContaining(`process ${other.child.pid}`) as string,
    });
    await other.kill();
    await (await openDatabase(dataFolder)).close();
    remove();
  });

  it("gives a folder to one of two that ask at once", async () => {
    const { dataFolder, remove } = temporaryDataFolder();
    const starts = await Promise.allSettled([openDatabase(dataFolder), openDatabase(dataFolder)]);
    const won = starts.flatMap((start) => (start.status === "fulfilled" ? [start.value] : []));
    expect(won).toHaveLength(1);
    await won[0]!.close();
    remove();
  });

  it.each(["3.51.3", "3.51.10", "3.52.0", "4.0.0"])("accepts SQLite %s", (version) => {
    expect(() => requireNewEnough(version)).not.toThrow();
  });

  it.each(["3.51.2", "3.9.0", "3.46.1"])("refuses SQLite %s", (version) => {
    expect(() => requireNewEnough(version)).toThrow(/too old/u);
  });
});
