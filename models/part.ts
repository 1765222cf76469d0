import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Part extends Model<InferAttributes<Part>, InferCreationAttributes<Part>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare sku: string;
  declare kind: string;
  declare name: string;
  declare datasheet: CreationOptional<Record<string, unknown>>;
  declare listed: CreationOptional<boolean>;
  declare unit: CreationOptional<string>;
  declare packSize: CreationOptional<string>;
  declare labourHours: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

export function initPart(sequelize: Sequelize): void {
  Part.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      sku: { type: DataTypes.TEXT, allowNull: false },
      kind: { type: DataTypes.TEXT, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      datasheet: { type: DataTypes.JSONB },
      listed: { type: DataTypes.BOOLEAN },
      unit: { type: DataTypes.TEXT },
      packSize: { type: DataTypes.DECIMAL(14, 4) },
      labourHours: { type: DataTypes.DECIMAL(14, 4) },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
      createdAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Part', tableName: 'parts' },
  );
}
