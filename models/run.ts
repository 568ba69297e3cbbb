import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One run as lists show it: a projection of its journal. */
export class RunRow extends Model<InferAttributes<RunRow>, InferCreationAttributes<RunRow>> {
  declare id: string;
  declare number: number;
  declare benchId: string;
  declare unitId: string;
  /** Not over: at most one a bench. */
  declare isActive: boolean;
  declare status: string | null;
  declare startedAtMs: number | null;
  declare outside: number | null;
  declare unitName: string | null;
  declare assetNumber: string | null;
  declare recipeName: string | null;
  declare benchName: string | null;
  declare startedBy: string | null;
  /** JSON in the shape of runSummarySchema; null before the first record. */
  declare summary: string | null;
}

export function initRunRow(sequelize: Sequelize): void {
  RunRow.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      number: { type: DataTypes.INTEGER, allowNull: false },
      benchId: { type: DataTypes.TEXT, allowNull: false },
      unitId: { type: DataTypes.TEXT, allowNull: false },
      isActive: { type: DataTypes.BOOLEAN, allowNull: false },
      status: { type: DataTypes.TEXT, allowNull: true },
      startedAtMs: { type: DataTypes.INTEGER, allowNull: true },
      outside: { type: DataTypes.INTEGER, allowNull: true },
      unitName: { type: DataTypes.TEXT, allowNull: true },
      assetNumber: { type: DataTypes.TEXT, allowNull: true },
      recipeName: { type: DataTypes.TEXT, allowNull: true },
      benchName: { type: DataTypes.TEXT, allowNull: true },
      startedBy: { type: DataTypes.TEXT, allowNull: true },
      summary: { type: DataTypes.TEXT, allowNull: true },
    },
    { sequelize, modelName: "Run", tableName: "runs", underscored: true, timestamps: false },
  );
}
