import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class ExistingLuminaire extends Model<
  InferAttributes<ExistingLuminaire>,
  InferCreationAttributes<ExistingLuminaire>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare areaId: string;
  declare luminaireType: string;
  declare quantity: string;
  declare countConfidence: CreationOptional<string>;
  declare watts: string;
  declare wattsSource: CreationOptional<string>;
  declare supplyVolts: CreationOptional<string | null>;
  declare electrical: CreationOptional<Record<string, unknown>>;
  declare details: CreationOptional<Record<string, unknown>>;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initExistingLuminaire(sequelize: Sequelize): void {
  ExistingLuminaire.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      areaId: { type: DataTypes.UUID, allowNull: false },
      luminaireType: { type: DataTypes.TEXT, allowNull: false },
      quantity: { type: DataTypes.DECIMAL(14, 4), allowNull: false },
      countConfidence: { type: DataTypes.TEXT },
      watts: { type: DataTypes.DECIMAL(14, 4), allowNull: false },
      wattsSource: { type: DataTypes.TEXT },
      supplyVolts: { type: DataTypes.DECIMAL(14, 4) },
      electrical: { type: DataTypes.JSONB },
      details: { type: DataTypes.JSONB },
      notes: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'ExistingLuminaire', tableName: 'existing_luminaires' },
  );
}
