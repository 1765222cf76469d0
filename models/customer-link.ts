import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class CustomerLink extends Model<
  InferAttributes<CustomerLink>,
  InferCreationAttributes<CustomerLink>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare contactEmail: string;
  declare tokenVersion: CreationOptional<number>;
  declare tokenSha256: string;
  declare createdAt: CreationOptional<Date>;
  declare revokedAt: CreationOptional<Date | null>;
  declare expiresAt: CreationOptional<Date | null>;
}

export function initCustomerLink(sequelize: Sequelize): void {
  CustomerLink.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      contactEmail: { type: DataTypes.TEXT, allowNull: false },
      tokenVersion: { type: DataTypes.INTEGER },
      tokenSha256: { type: DataTypes.TEXT, allowNull: false },
      createdAt: { type: DataTypes.DATE },
      revokedAt: { type: DataTypes.DATE },
      expiresAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'CustomerLink', tableName: 'customer_links' },
  );
}
