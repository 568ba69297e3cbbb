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

/** Lays the demo laboratory's people, instruments, benches and recipes in an empty database. */
export async function layDemoRegister({ repositories, hashPassword, nowMs }: LayDemoInput): Promise<void> {
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  await repositories.siteSettings.set("site.name", demoSite.name);
  await repositories.siteSettings.set("site.place", demoSite.place);
  for (const person of demoPeople) await repositories.people.create(person, passwordHash);
  for (const model of demoModels) await repositories.unitModels.create(model);
  for (const unit of demoUnits()) await repositories.units.create(unit);
  const standards = demoStandards(nowMs);
  for (const standard of standards) await repositories.standards.create(standard);
  for (const [position, bench] of demoBenches(standards).entries()) await repositories.benches.create(bench, position);
  for (const recipe of demoRecipes) await repositories.recipes.create(recipe, "Tomas Reyl");
}
