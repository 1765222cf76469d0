import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare personId: string;
  declare name: string;
  declare email: string;
  declare roles: string[];
  declare licenceNumber: CreationOptional<string>;
  declare mainsQualified: CreationOptional<boolean>;
  declare phone: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

export function initMembership(sequelize: Sequelize): void {
  Membership.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      personId: { type: DataTypes.UUID, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      email: { type: DataTypes.TEXT, allowNull: false },
      roles: { type: DataTypes.ARRAY(DataTypes.TEXT), allowNull: false },
      licenceNumber: { type: DataTypes.TEXT },
      mainsQualified: { type: DataTypes.BOOLEAN },
      phone: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
      createdAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Membership', tableName: 'memberships' },
  );
}
