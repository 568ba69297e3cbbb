import type { Transaction } from "sequelize";
import { RecipeVersionRow } from "@/models";
import { recipeVersionSchema, type RecipeVersion } from "@/lib/schemas/recipe";
import { saveRecipeSchema, type SaveRecipe } from "@/lib/schemas/run";
import { DataError } from "./data-error";
import { nullOr } from "./null-or";
import type { Database } from "./open-database";
import type { RecipesRepository } from "./repositories";

export function createRecipesRepository(database: Database): RecipesRepository {
  const newestFirst = async (where: { recipeId?: string; state?: string }, transaction?: Transaction) => {
    const rows = await RecipeVersionRow.findAll({
      where,
      order: [["version", "DESC"]],
      transaction: transaction ?? null,
    });
    return rows.map(toVersion);
  };
  return {
    list: async () => newestOfEach(await newestFirst({})),
    listReleased: async () => newestOfEach(await newestFirst({ state: "released" })),
    versions: (recipeId) => newestFirst({ recipeId }),
    getVersion: async (id) => nullOr(await RecipeVersionRow.findByPk(id), toVersion),
    create: (recipe, by) =>
      database.write((transaction) => insertVersion(crypto.randomUUID(), 1, recipe, by, transaction)),
    save: (recipeId, recipe, by) =>
      database.write(async (transaction) => {
        const [newest] = await newestFirst({ recipeId }, transaction);
        if (!newest) throw new DataError("unknown-record", "This recipe does not exist any more.");
        if (newest.state !== "draft") return insertVersion(recipeId, newest.version + 1, recipe, by, transaction);
        return changeDraft(newest, recipe, by, transaction);
      }),
  };
}

async function insertVersion(
  recipeId: string,
  version: number,
  recipe: SaveRecipe,
  by: string,
  transaction: Transaction,
): Promise<RecipeVersion> {
  const { document, modelIds, release } = saveRecipeSchema.parse(recipe);
  const row = {
    id: crypto.randomUUID(),
    recipeId,
    version,
    state: release ? "released" : "draft",
    document: JSON.stringify(document),
    modelIds: JSON.stringify(modelIds),
    changedBy: by,
    changedAtMs: Date.now(),
  };
  return toVersion(await RecipeVersionRow.create(row, { transaction }));
}

async function changeDraft(
  draft: RecipeVersion,
  recipe: SaveRecipe,
  by: string,
  transaction: Transaction,
): Promise<RecipeVersion> {
  const { document, modelIds, release } = saveRecipeSchema.parse(recipe);
  const change = {
    document: JSON.stringify(document),
    modelIds: JSON.stringify(modelIds),
    changedBy: by,
    changedAtMs: Date.now(),
  };
  await RecipeVersionRow.update(
    { ...change, state: release ? "released" : "draft" },
    { where: { id: draft.id }, transaction },
  );
  return {
    ...draft,
    document,
    modelIds,
    state: release ? "released" : "draft",
    changedBy: by,
    changedAtMs: change.changedAtMs,
  };
}

function newestOfEach(newestFirst: readonly RecipeVersion[]): RecipeVersion[] {
  const newest = new Map<string, RecipeVersion>();
  for (const version of newestFirst) if (!newest.has(version.recipeId)) newest.set(version.recipeId, version);
  return [...newest.values()].sort((a, b) => a.document.name.localeCompare(b.document.name));
}

function toVersion(row: RecipeVersionRow): RecipeVersion {
  const { id, recipeId, version, state, changedBy, changedAtMs } = row;
  return recipeVersionSchema.parse({
    id,
    recipeId,
    version,
    state,
    changedBy,
    changedAtMs,
    document: JSON.parse(row.document),
    modelIds: JSON.parse(row.modelIds),
  });
}
