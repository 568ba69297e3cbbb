import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One client-made id that has been acted on. */
export class CommandSeenRow extends Model<InferAttributes<CommandSeenRow>, InferCreationAttributes<CommandSeenRow>> {
  declare id: string;
  declare outcome: string;
  declare atMs: number;
}

export function initCommandSeenRow(sequelize: Sequelize): void {
  CommandSeenRow.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      outcome: { type: DataTypes.TEXT, allowNull: false },
      atMs: { type: DataTypes.INTEGER, allowNull: false },
    },
    { sequelize, modelName: "CommandSeen", tableName: "commands_seen", underscored: true, timestamps: false },
  );
}
