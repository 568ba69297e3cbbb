import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One bench, its standard apart. */
export class BenchRow extends Model<InferAttributes<BenchRow>, InferCreationAttributes<BenchRow>> {
  declare id: string;
  /** Place in lists, from 0. */
  declare position: number;
  declare standardId: string;
  /** JSON in the shape of benchSchema without its standard. */
  declare document: string;
}

export function initBenchRow(sequelize: Sequelize): void {
  BenchRow.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      position: { type: DataTypes.INTEGER, allowNull: false },
      standardId: { type: DataTypes.TEXT, allowNull: false },
      document: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, modelName: "Bench", tableName: "benches", underscored: true, timestamps: false },
  );
}
