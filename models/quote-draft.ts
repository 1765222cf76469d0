import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class QuoteDraft extends Model<InferAttributes<QuoteDraft>, InferCreationAttributes<QuoteDraft>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare depositPct: CreationOptional<string>;
  declare discountPct: CreationOptional<string>;
  declare overheadPct: CreationOptional<string>;
  declare contingencyPct: CreationOptional<string>;
  declare taxName: CreationOptional<string>;
  declare taxRatePct: CreationOptional<string>;
  declare validDays: CreationOptional<number>;
  declare scopeNote: CreationOptional<string>;
  declare exclusions: CreationOptional<string>;
  declare pricesAt: CreationOptional<Date>;
  declare version: CreationOptional<number>;
}

export function initQuoteDraft(sequelize: Sequelize): void {
  QuoteDraft.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      depositPct: { type: DataTypes.DECIMAL(9, 6) },
      discountPct: { type: DataTypes.DECIMAL(9, 6) },
      overheadPct: { type: DataTypes.DECIMAL(9, 6) },
      contingencyPct: { type: DataTypes.DECIMAL(9, 6) },
      taxName: { type: DataTypes.TEXT },
      taxRatePct: { type: DataTypes.DECIMAL(9, 6) },
      validDays: { type: DataTypes.INTEGER },
      scopeNote: { type: DataTypes.TEXT },
      exclusions: { type: DataTypes.TEXT },
      pricesAt: { type: DataTypes.DATE },
      version: { type: DataTypes.INTEGER },
    },
    { sequelize, modelName: 'QuoteDraft', tableName: 'quote_drafts' },
  );
}
