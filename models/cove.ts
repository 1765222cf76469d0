import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Cove extends Model<InferAttributes<Cove>, InferCreationAttributes<Cove>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare areaId: string;
  declare name: string;
  declare tapeMetres: string;
  declare driverMetres: string;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initCove(sequelize: Sequelize): void {
  Cove.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      areaId: { type: DataTypes.UUID, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      tapeMetres: { type: DataTypes.DECIMAL(14, 4), allowNull: false },
      driverMetres: { type: DataTypes.DECIMAL(14, 4), allowNull: false },
      notes: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Cove', tableName: 'coves' },
  );
}
