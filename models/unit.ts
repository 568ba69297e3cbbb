import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One tester to be checked. */
export class UnitRow extends Model<InferAttributes<UnitRow>, InferCreationAttributes<UnitRow>> {
  declare id: string;
  declare modelId: string;
  declare serialNumber: string;
  declare assetNumber: string;
  /** JSON in the shape of testerPhysicsSchema; null for hardware. */
  declare simulation: string | null;
}

export function initUnitRow(sequelize: Sequelize): void {
  UnitRow.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      modelId: { type: DataTypes.TEXT, allowNull: false },
      serialNumber: { type: DataTypes.TEXT, allowNull: false },
      assetNumber: { type: DataTypes.TEXT, allowNull: false },
      simulation: { type: DataTypes.TEXT, allowNull: true },
    },
    { sequelize, modelName: "Unit", tableName: "units", underscored: true, timestamps: false },
  );
}
