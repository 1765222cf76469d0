import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class PaymentSession extends Model<
  InferAttributes<PaymentSession>,
  InferCreationAttributes<PaymentSession>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare invoiceId: string;
  declare account: CreationOptional<string>;
  declare checkoutId: CreationOptional<string | null>;
  declare url: CreationOptional<string | null>;
  declare amountMinor: string;
  declare currency: string;
  declare state: CreationOptional<string>;
  declare createdAt: CreationOptional<Date>;
  declare checkedAt: CreationOptional<Date | null>;
}

export function initPaymentSession(sequelize: Sequelize): void {
  PaymentSession.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      invoiceId: { type: DataTypes.UUID, allowNull: false },
      account: { type: DataTypes.TEXT },
      checkoutId: { type: DataTypes.TEXT },
      url: { type: DataTypes.TEXT },
      amountMinor: { type: DataTypes.BIGINT, allowNull: false },
      currency: { type: DataTypes.CHAR(3), allowNull: false },
      state: { type: DataTypes.TEXT },
      createdAt: { type: DataTypes.DATE },
      checkedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'PaymentSession', tableName: 'payment_sessions' },
  );
}
