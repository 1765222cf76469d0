import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Customer extends Model<InferAttributes<Customer>, InferCreationAttributes<Customer>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare name: string;
  declare contactName: CreationOptional<string>;
  declare email: CreationOptional<string>;
  declare phone: CreationOptional<string>;
  declare address: CreationOptional<string>;
  declare consumer: CreationOptional<boolean>;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

export function initCustomer(sequelize: Sequelize): void {
  Customer.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      name: { type: DataTypes.TEXT, allowNull: false },
      contactName: { type: DataTypes.TEXT },
      email: { type: DataTypes.TEXT },
      phone: { type: DataTypes.TEXT },
      address: { type: DataTypes.TEXT },
      consumer: { type: DataTypes.BOOLEAN },
      notes: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
      createdAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Customer', tableName: 'customers' },
  );
}
