import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Site extends Model<InferAttributes<Site>, InferCreationAttributes<Site>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare customerId: string;
  declare name: string;
  declare address: CreationOptional<string>;
  declare buildingYear: CreationOptional<number | null>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

export function initSite(sequelize: Sequelize): void {
  Site.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      customerId: { type: DataTypes.UUID, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      address: { type: DataTypes.TEXT },
      buildingYear: { type: DataTypes.INTEGER },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
      createdAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Site', tableName: 'sites' },
  );
}
