import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One resistance standard. */
export class StandardRow extends Model<InferAttributes<StandardRow>, InferCreationAttributes<StandardRow>> {
  declare id: string;
  /** JSON in the shape of standardSchema. */
  declare document: string;
}

export function initStandardRow(sequelize: Sequelize): void {
  StandardRow.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      document: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, modelName: "Standard", tableName: "standards", underscored: true, timestamps: false },
  );
}
