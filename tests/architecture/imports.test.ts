import { existsSync, readdirSync, readFileSync, statSync } from "node:fs";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";

const root = fileURLToPath(new URL("../..", import.meta.url));

/** Rooms whose code has no React, no I/O and no clock. */
const pure = ["lib/units", "lib/schemas", "lib/metrology", "lib/planning", "lib/journal"];

interface Rule {
  folder: string;
  /** Rooms of ours that may be imported as values; a room may always import itself. */
  may: readonly string[];
  /** Rooms of which types alone may be imported. */
  mayTypes?: readonly string[];
  /** Packages that must not appear. */
  neverPackages?: RegExp;
}

const noRuntime = /^(node:|react|next|sequelize|sqlite3|serialport|@serialport|socket\.io|zustand|uplot|pino)/u;
const noWeb = /^(react|next(\/|$)|socket\.io|zustand|uplot)/u;
const noServer = /^(node:|sequelize|sqlite3|serialport|@serialport|pino|bcryptjs|iron-session|socket\.io$)/u;

/** Who may import whom; DEVELOPERS.md carries the same table in words. */
const rules: readonly Rule[] = [
  { folder: "lib/units", may: [], neverPackages: noRuntime },
  { folder: "lib/schemas", may: ["lib/units"], neverPackages: noRuntime },
  { folder: "lib/metrology", may: ["lib/units", "lib/schemas"], neverPackages: noRuntime },
  { folder: "lib/planning", may: ["lib/units", "lib/schemas", "lib/metrology"], neverPackages: noRuntime },
  {
    folder: "lib/journal",
    may: ["lib/units", "lib/schemas", "lib/metrology", "lib/planning"],
    neverPackages: noRuntime,
  },
  { folder: "drivers", may: ["lib/units"], mayTypes: ["lib/schemas", "lib/engine/clock"], neverPackages: noWeb },
  {
    folder: "lib/engine",
    may: [...pure, "drivers/driver-error", "drivers/discharge-permit"],
    mayTypes: ["drivers", "lib/data"],
    neverPackages: /^(react|next(\/|$)|socket\.io|sequelize|sqlite3|serialport|@serialport)/u,
  },
  { folder: "models", may: [], neverPackages: /^(?!sequelize$)/u },
  { folder: "migrations", may: [], neverPackages: /^(?!sequelize$)/u },
  { folder: "lib/data", may: ["models", "migrations", ...pure], neverPackages: noWeb },
  {
    folder: "lib/auth",
    may: pure,
    mayTypes: ["lib/data"],
    neverPackages: /^(react|socket\.io|sequelize|sqlite3|serialport)/u,
  },
  {
    folder: "lib/server",
    may: ["lib/auth", ...pure],
    mayTypes: ["lib/engine", "lib/data"],
    neverPackages: /^(sequelize|sqlite3|serialport)/u,
  },
  { folder: "lib/client", may: [...pure, "lib/auth/permissions", "components"], neverPackages: noServer },
  { folder: "components", may: [...pure, "lib/auth/permissions", "lib/client"], neverPackages: noServer },
  {
    folder: "app",
    may: ["components", "lib/server", "lib/client", "lib/auth/permissions", ...pure],
    mayTypes: ["lib/data"],
    neverPackages: /^(sequelize|sqlite3|serialport|pino)/u,
  },
];

const IMPORT = /^(?:import|export)\s+(type\s)?[^;]*?from\s+["']([^"']+)["']/gmu;

interface Import {
  file: string;
  specifier: string;
  isType: boolean;
}

function importsOf(folder: string): Import[] {
  return readdirSync(path.join(root, folder), { recursive: true, encoding: "utf8" })
    .filter((name) => /\.tsx?$/u.test(name))
    .flatMap((name) => {
      const file = path.join(folder, name);
      const text = readFileSync(path.join(root, file), "utf8");
      return [...text.matchAll(IMPORT)].map((match) => ({
        file,
        specifier: match[2]!,
        isType: match[1] !== undefined,
      }));
    });
}

/** The room a specifier leads to, from the project's root; null for a package. */
function target({ file, specifier }: Import): string | null {
  if (specifier.startsWith("@/")) return specifier.slice(2);
  if (specifier.startsWith(".")) return path.join(path.dirname(file), specifier);
  return null;
}

function isInside(place: string, room: string): boolean {
  return place === room || place.startsWith(`${room}/`);
}

function isAllowed(entry: Import, rule: Rule): boolean {
  const place = target(entry);
  if (place === null) return entry.isType || !rule.neverPackages?.test(entry.specifier);
  if (isInside(place, rule.folder)) return true;
  if (rule.may.some((room) => isInside(place, room))) return true;
  return entry.isType && (rule.mayTypes ?? []).some((room) => isInside(place, room));
}

describe("the import table", () => {
  it.each(rules)("$folder imports nothing outside its layer", (rule) => {
    const imports = importsOf(rule.folder);
    const broken = imports
      .filter((entry) => !isAllowed(entry, rule))
      .map(({ file, specifier }) => `${file}: ${specifier}`);
    expect(statSync(path.join(root, rule.folder)).isDirectory()).toBe(true);
    expect(broken).toEqual([]);
  });

  it("catches a forbidden import", () => {
    const rule = rules.find(({ folder }) => folder === "lib/metrology")!;
    expect(isAllowed({ file: "lib/metrology/x.ts", specifier: "@/lib/engine/clock", isType: false }, rule)).toBe(false);
    expect(isAllowed({ file: "lib/metrology/x.ts", specifier: "node:fs", isType: false }, rule)).toBe(false);
    expect(isAllowed({ file: "lib/metrology/x.ts", specifier: "../units/format", isType: false }, rule)).toBe(true);
  });

  it.each(pure)("%s reads no clock, draws no chance and awaits nothing", (folder) => {
    const impure = /Date\.now|new Date\(\)|Math\.random|performance\.now|\basync\b|\bawait\b|process\.env/u;
    const broken = readdirSync(path.join(root, folder), { recursive: true, encoding: "utf8" })
      .filter((name) => name.endsWith(".ts"))
      .filter((name) => impure.test(withoutComments(readFileSync(path.join(root, folder, name), "utf8"))));
    expect(broken).toEqual([]);
  });

  it("has every room of the table", () => {
    expect(rules.map(({ folder }) => folder).filter((folder) => !existsSync(path.join(root, folder)))).toEqual([]);
  });
});

function withoutComments(text: string): string {
  return text.replace(/\/\*[\s\S]*?\*\//gu, "").replace(/\/\/.*$/gmu, "");
}
