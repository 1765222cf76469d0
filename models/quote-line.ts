import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class QuoteLine extends Model<InferAttributes<QuoteLine>, InferCreationAttributes<QuoteLine>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare draftId: string;
  declare position: CreationOptional<number>;
  declare source: string;
  declare sourceId: CreationOptional<string | null>;
  declare sourceSha256: CreationOptional<string | null>;
  declare sourceDescription: CreationOptional<string>;
  declare areaName: CreationOptional<string>;
  declare description: string;
  declare quantity: string;
  declare unitCost: string;
  declare unitLabourHours: CreationOptional<string>;
  declare labourRate: CreationOptional<string>;
  declare markupPct: CreationOptional<string>;
  declare taxable: CreationOptional<boolean>;
  declare optional: CreationOptional<boolean>;
  declare chosen: CreationOptional<boolean>;
  declare version: CreationOptional<number>;
}

export function initQuoteLine(sequelize: Sequelize): void {
  QuoteLine.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      draftId: { type: DataTypes.UUID, allowNull: false },
      position: { type: DataTypes.INTEGER },
      source: { type: DataTypes.TEXT, allowNull: false },
      sourceId: { type: DataTypes.UUID },
      sourceSha256: { type: DataTypes.TEXT },
      sourceDescription: { type: DataTypes.TEXT },
      areaName: { type: DataTypes.TEXT },
      description: { type: DataTypes.TEXT, allowNull: false },
      quantity: { type: DataTypes.DECIMAL(14, 4), allowNull: false },
      unitCost: { type: DataTypes.DECIMAL(18, 6), allowNull: false },
      unitLabourHours: { type: DataTypes.DECIMAL(14, 4) },
      labourRate: { type: DataTypes.DECIMAL(18, 6) },
      markupPct: { type: DataTypes.DECIMAL(9, 6) },
      taxable: { type: DataTypes.BOOLEAN },
      optional: { type: DataTypes.BOOLEAN },
      chosen: { type: DataTypes.BOOLEAN },
      version: { type: DataTypes.INTEGER },
    },
    { sequelize, modelName: 'QuoteLine', tableName: 'quote_lines' },
  );
}
