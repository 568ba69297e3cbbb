// Runs before any package is installed, so it uses Node alone.
import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, readdirSync, statSync, writeFileSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";

export const root = path.resolve(fileURLToPath(new URL("../..", import.meta.url)));

/** Folders and files that the built pages depend on. */
const SOURCES = [
  "app",
  "components",
  "lib",
  "drivers",
  "fonts",
  "next.config.mjs",
  "postcss.config.mjs",
  "tailwind.config.ts",
  "tsconfig.json",
  "package-lock.json",
];
const STAMPS = path.join(root, "node_modules", ".stepwell");

function filesBelow(place) {
  const full = path.join(root, place);
  if (!statSync(full).isDirectory()) return [full];
  return readdirSync(full, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => path.join(entry.parentPath ?? entry.path, entry.name))
    .sort();
}

function digest(files) {
  const hash = createHash("sha256");
  for (const file of files) hash.update(path.relative(root, file)).update("\0").update(readFileSync(file)).update("\0");
  return hash.digest("hex");
}

function stampIs(name, value) {
  const file = path.join(STAMPS, name);
  return existsSync(file) && readFileSync(file, "utf8") === value;
}

function writeStamp(name, value) {
  mkdirSync(STAMPS, { recursive: true });
  writeFileSync(path.join(STAMPS, name), value);
}

/** Runs a command to its end with its output shown; ends this process with its exit code if it fails. */
export function run(command, args, options = {}) {
  const { status, error } = spawnSync(command, args, { cwd: root, stdio: "inherit", ...options });
  if (error) throw error;
  if (status !== 0) process.exit(status ?? 1);
}

function requireTools() {
  const major = Number(process.versions.node.split(".")[0]);
  if (major < 20) {
    console.error(`Stepwell needs Node 20 or newer; this is ${process.version}.`);
    process.exit(1);
  }
}

/** Installs the packages of package-lock.json unless just these are installed. */
export function installPackages() {
  requireTools();
  const wanted = digest([path.join(root, "package-lock.json")]);
  if (stampIs("installed", wanted)) return;
  console.log("Installing packages (about three minutes the first time; sqlite3 is compiled) …");
  run("npm", ["ci", "--include=dev", "--no-audit", "--no-fund"]);
  writeStamp("installed", wanted);
}

/** Builds the pages unless they are built from just these sources. */
export function buildPages() {
  const wanted = digest(SOURCES.flatMap(filesBelow));
  if (existsSync(path.join(root, ".next", "BUILD_ID")) && stampIs("built", wanted)) return;
  console.log("Building the pages …");
  run(process.execPath, [path.join(root, "node_modules", "next", "dist", "bin", "next"), "build"], {
    env: { ...process.env, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" },
  });
  writeStamp("built", wanted);
}
