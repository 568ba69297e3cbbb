import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One person who may sign in. */
export class PersonRow extends Model<InferAttributes<PersonRow>, InferCreationAttributes<PersonRow>> {
  declare id: string;
  declare email: string;
  declare name: string;
  /** JSON list of roles. */
  declare roles: string;
  declare active: boolean;
  declare passwordHash: string;
  declare createdAtMs: number;
}

export function initPersonRow(sequelize: Sequelize): void {
  PersonRow.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      email: { type: DataTypes.TEXT, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      roles: { type: DataTypes.TEXT, allowNull: false },
      active: { type: DataTypes.BOOLEAN, allowNull: false },
      passwordHash: { type: DataTypes.TEXT, allowNull: false },
      createdAtMs: { type: DataTypes.INTEGER, allowNull: false },
    },
    { sequelize, modelName: "Person", tableName: "people", underscored: true, timestamps: false },
  );
}
