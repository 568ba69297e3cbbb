import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One committed batch of a journal with the hash chain up to its end. */
export class JournalBatchRow extends Model<InferAttributes<JournalBatchRow>, InferCreationAttributes<JournalBatchRow>> {
  declare runId: string;
  declare lastSeq: number;
  declare firstSeq: number;
  declare hash: string;
}

export function initJournalBatchRow(sequelize: Sequelize): void {
  JournalBatchRow.init(
    {
      runId: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      lastSeq: { type: DataTypes.INTEGER, primaryKey: true, allowNull: false },
      firstSeq: { type: DataTypes.INTEGER, allowNull: false },
      hash: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, modelName: "JournalBatch", tableName: "journal_batches", underscored: true, timestamps: false },
  );
}
