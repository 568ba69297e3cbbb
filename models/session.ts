import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One signed-in session; its id is stored as a hash alone. */
export class SessionRow extends Model<InferAttributes<SessionRow>, InferCreationAttributes<SessionRow>> {
  declare idHash: string;
  declare personId: string;
  declare createdAtMs: number;
  declare lastSeenAtMs: number;
  declare expiresAtMs: number;
}

export function initSessionRow(sequelize: Sequelize): void {
  SessionRow.init(
    {
      idHash: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      personId: { type: DataTypes.TEXT, allowNull: false },
      createdAtMs: { type: DataTypes.INTEGER, allowNull: false },
      lastSeenAtMs: { type: DataTypes.INTEGER, allowNull: false },
      expiresAtMs: { type: DataTypes.INTEGER, allowNull: false },
    },
    { sequelize, modelName: "Session", tableName: "sessions", underscored: true, timestamps: false },
  );
}
