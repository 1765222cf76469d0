import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class PartPrice extends Model<InferAttributes<PartPrice>, InferCreationAttributes<PartPrice>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare partId: string;
  declare unitCost: string;
  declare currency: string;
  declare validFrom: CreationOptional<Date>;
}

export function initPartPrice(sequelize: Sequelize): void {
  PartPrice.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      partId: { type: DataTypes.UUID, allowNull: false },
      unitCost: { type: DataTypes.DECIMAL(18, 6), allowNull: false },
      currency: { type: DataTypes.CHAR(3), allowNull: false },
      validFrom: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'PartPrice', tableName: 'part_prices' },
  );
}
