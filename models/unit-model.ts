import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One model of tester. */
export class UnitModelRow extends Model<InferAttributes<UnitModelRow>, InferCreationAttributes<UnitModelRow>> {
  declare id: string;
  /** JSON in the shape of unitModelSchema. */
  declare document: string;
}

export function initUnitModelRow(sequelize: Sequelize): void {
  UnitModelRow.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      document: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, modelName: "UnitModel", tableName: "unit_models", underscored: true, timestamps: false },
  );
}
