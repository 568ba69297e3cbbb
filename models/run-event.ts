import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One record of a run's journal, readings apart. Rows are only ever inserted. */
export class RunEventRow extends Model<InferAttributes<RunEventRow>, InferCreationAttributes<RunEventRow>> {
  declare runId: string;
  /** 1, 2, 3 … within a run, shared with its readings. */
  declare seq: number;
  declare atMs: number;
  declare elapsedMs: number;
  declare type: string;
  declare data: string;
}

export function initRunEventRow(sequelize: Sequelize): void {
  RunEventRow.init(
    {
      runId: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      seq: { type: DataTypes.INTEGER, primaryKey: true, allowNull: false },
      atMs: { type: DataTypes.INTEGER, allowNull: false },
      elapsedMs: { type: DataTypes.INTEGER, allowNull: false },
      type: { type: DataTypes.TEXT, allowNull: false },
      data: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, modelName: "RunEvent", tableName: "run_events", underscored: true, timestamps: false },
  );
}
