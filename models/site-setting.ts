import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from "sequelize";

/** One setting of the site. */
export class SiteSettingRow extends Model<InferAttributes<SiteSettingRow>, InferCreationAttributes<SiteSettingRow>> {
  declare key: string;
  declare value: string;
}

export function initSiteSettingRow(sequelize: Sequelize): void {
  SiteSettingRow.init(
    {
      key: { type: DataTypes.TEXT, primaryKey: true, allowNull: false },
      value: { type: DataTypes.TEXT, allowNull: false },
    },
    { sequelize, modelName: "SiteSetting", tableName: "site_settings", underscored: true, timestamps: false },
  );
}
