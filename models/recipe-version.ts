import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One version of a recipe. A released one never changes. */
export class RecipeVersionRow extends Model<
  InferAttributes<RecipeVersionRow>,
  InferCreationAttributes<RecipeVersionRow>
> {
  declare id: string;
  declare recipeId: string;
  declare version: number;
  declare state: string;
  /** JSON in the shape of recipeDocumentSchema. */
  declare document: string;
  /** JSON list. */
  declare modelIds: string;
  declare changedBy: string;
  declare changedAtMs: number;
}

export function initRecipeVersionRow(sequelize: Sequelize): void {
  RecipeVersionRow.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      recipeId: { type: DataTypes.TEXT, allowNull: false },
      version: { type: DataTypes.INTEGER, allowNull: false },
      state: { type: DataTypes.TEXT, allowNull: false },
      document: { type: DataTypes.TEXT, allowNull: false },
      modelIds: { type: DataTypes.TEXT, allowNull: false },
      changedBy: { type: DataTypes.TEXT, allowNull: false },
      changedAtMs: { type: DataTypes.INTEGER, allowNull: false },
    },
    { sequelize, modelName: "RecipeVersion", tableName: "recipe_versions", underscored: true, timestamps: false },
  );
}
