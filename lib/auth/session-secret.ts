import { randomBytes } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import path from "node:path";

const FILE_NAME = "session.key";

/** The secret that seals session cookies: the one of the environment, or one made once and kept in the data folder (mode 0600). */
export function loadSessionSecret(dataFolder: string, fromEnvironment: string | undefined): string {
  if (fromEnvironment) return fromEnvironment;
  const file = path.join(dataFolder, FILE_NAME);
  if (!existsSync(file)) writeFileSync(file, randomBytes(32).toString("hex"), { mode: 0o600, flag: "wx" });
  return readFileSync(file, "utf8").trim();
}
