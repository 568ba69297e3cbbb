import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One reading of a run. Rows are only ever inserted. */
export class ReadingRow extends Model<InferAttributes<ReadingRow>, InferCreationAttributes<ReadingRow>> {
  declare runId: string;
  declare seq: number;
  declare atMs: number;
  declare elapsedMs: number;
  declare point: number;
  declare attempt: number;
  declare phase: string;
  declare ohms: number | null;
  declare volts: number | null;
  declare amperes: number | null;
  /** Comma-separated. */
  declare flags: string;
  /** The reply, letter for letter. */
  declare raw: string;
}

export function initReadingRow(sequelize: Sequelize): void {
  ReadingRow.init(
    {
      runId: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      seq: { type: DataTypes.INTEGER, primaryKey: true, allowNull: false },
      atMs: { type: DataTypes.INTEGER, allowNull: false },
      elapsedMs: { type: DataTypes.INTEGER, allowNull: false },
      point: { type: DataTypes.INTEGER, allowNull: false },
      attempt: { type: DataTypes.INTEGER, allowNull: false },
      phase: { type: DataTypes.TEXT, allowNull: false },
      ohms: { type: DataTypes.DOUBLE, allowNull: true },
      volts: { type: DataTypes.DOUBLE, allowNull: true },
      amperes: { type: DataTypes.DOUBLE, allowNull: true },
      flags: { type: DataTypes.TEXT, allowNull: false },
      raw: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, modelName: "Reading", tableName: "readings", underscored: true, timestamps: false },
  );
}
