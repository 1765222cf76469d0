import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Payment extends Model<InferAttributes<Payment>, InferCreationAttributes<Payment>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare invoiceId: string;
  declare paymentSessionId: CreationOptional<string | null>;
  declare method: string;
  declare account: CreationOptional<string>;
  declare externalId: CreationOptional<string | null>;
  declare amountMinor: string;
  declare currency: string;
  declare receivedOn: string;
  declare reference: CreationOptional<string>;
  declare recordedBy: CreationOptional<string | null>;
  declare at: CreationOptional<Date>;
}

export function initPayment(sequelize: Sequelize): void {
  Payment.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      invoiceId: { type: DataTypes.UUID, allowNull: false },
      paymentSessionId: { type: DataTypes.UUID },
      method: { type: DataTypes.TEXT, allowNull: false },
      account: { type: DataTypes.TEXT },
      externalId: { type: DataTypes.TEXT },
      amountMinor: { type: DataTypes.BIGINT, allowNull: false },
      currency: { type: DataTypes.CHAR(3), allowNull: false },
      receivedOn: { type: DataTypes.DATEONLY, allowNull: false },
      reference: { type: DataTypes.TEXT },
      recordedBy: { type: DataTypes.UUID },
      at: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Payment', tableName: 'payments' },
  );
}
