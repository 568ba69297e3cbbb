import { readFileSync, readdirSync, statSync } from "node:fs";
import path from "node:path";
import { afterEach, beforeEach, expect, it } from "vitest";
import { loadSessionSecret } from "@/lib/auth/session-secret";
import { temporaryDataFolder } from "../support/server-process";

let folder: ReturnType<typeof temporaryDataFolder>;

beforeEach(() => {
  folder = temporaryDataFolder();
});

afterEach(() => folder.remove());

it("makes a secret of 256 bits once and keeps it for its owner alone", () => {
  const secret = loadSessionSecret(folder.dataFolder, undefined);
  expect(secret).toMatch(/^[0-9a-f]{64}$/u);
  expect(loadSessionSecret(folder.dataFolder, undefined)).toBe(secret);
  expect(readdirSync(folder.dataFolder)).toEqual(["session.key"]);
  const file = path.join(folder.dataFolder, "session.key");
  expect(statSync(file).mode & 0o777).toBe(0o600);
  expect(readFileSync(file, "utf8")).toBe(secret);
});

it("makes another one for another folder", () => {
  const other = temporaryDataFolder();
  expect(loadSessionSecret(other.dataFolder, undefined)).not.toBe(loadSessionSecret(folder.dataFolder, undefined));
  other.remove();
});

it("takes the one of the environment and writes nothing", () => {
  expect(loadSessionSecret(folder.dataFolder, "from outside")).toBe("from outside");
  expect(readdirSync(folder.dataFolder)).toEqual([]);
});
