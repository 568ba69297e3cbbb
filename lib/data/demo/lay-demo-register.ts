import type { Repositories } from "../repositories";
import { demoBenches } from "./demo-benches";
import { DEMO_PASSWORD, demoPeople, demoSite } from "./demo-people";
import { demoRecipes } from "./demo-recipes";
import { demoStandards } from "./demo-standards";
import { demoModels, demoUnits } from "./demo-units";

export interface LayDemoInput {
  repositories: Repositories;
  hashPassword: (password: string) => Promise<string>;
  nowMs: number;
}

/**
 * Lays the demo laboratory's instruments, benches, recipes and people in an empty database. People come last: while
 * there is none, a start that was cut off is taken up again, and what it had laid is left as it is.
 */
export async function layDemoRegister({ repositories, hashPassword, nowMs }: LayDemoInput): Promise<void> {
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  const { siteSettings, unitModels, units, standards, benches, recipes, people } = repositories;
  await siteSettings.set("site.name", demoSite.name);
  await siteSettings.set("site.place", demoSite.place);
  await layMissing(demoModels, await unitModels.list(), idOf, unitModels.create);
  await layMissing(demoUnits(), await units.list(""), idOf, units.create);
  await layMissing(demoStandards(nowMs), await standards.list(), idOf, standards.create);
  const demo = demoBenches(await standards.list());
  await layMissing(demo, await benches.list(), idOf, (bench) => benches.create(bench, demo.indexOf(bench)));
  await layMissing(demoRecipes, await recipes.list(), nameOf, (recipe) => recipes.create(recipe, "Tomas Reyl"));
  for (const person of demoPeople) await people.create(person, passwordHash);
}

/** Lays those that are not there yet, told apart by their key. */
async function layMissing<T extends K, K>(
  wanted: readonly T[],
  present: readonly K[],
  keyOf: (item: K) => string,
  lay: (item: T) => Promise<unknown>,
): Promise<void> {
  const known = new Set(present.map(keyOf));
  for (const item of wanted) if (!known.has(keyOf(item))) await lay(item);
}

const idOf = ({ id }: { id: string }) => id;
const nameOf = ({ document }: { document: { name: string } }) => document.name;
