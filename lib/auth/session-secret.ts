import { randomBytes } from "node:crypto";
import { existsSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import path from "node:path";

const FILE_NAME = "session.key";

/** The secret that seals session cookies: the one of the environment, or one made once and kept in the data folder (mode 0600). */
export function loadSessionSecret(dataFolder: string, fromEnvironment: string | undefined): string {
  if (fromEnvironment) return fromEnvironment;
  const file = path.join(dataFolder, FILE_NAME);
  if (!existsSync(file)) writeSecret(file);
  return readFileSync(file, "utf8").trim();
}

/** Put in place whole, so that a kill can't leave half a secret. */
function writeSecret(file: string): void {
  const unfinished = `${file}.new`;
  writeFileSync(unfinished, randomBytes(32).toString("hex"), { mode: 0o600 });
  renameSync(unfinished, file);
}
