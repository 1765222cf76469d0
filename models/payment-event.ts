import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class PaymentEvent extends Model<
  InferAttributes<PaymentEvent>,
  InferCreationAttributes<PaymentEvent>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare account: CreationOptional<string>;
  declare eventId: string;
  declare type: string;
  declare objectId: string;
  declare receivedAt: CreationOptional<Date>;
}

export function initPaymentEvent(sequelize: Sequelize): void {
  PaymentEvent.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      account: { type: DataTypes.TEXT },
      eventId: { type: DataTypes.TEXT, allowNull: false },
      type: { type: DataTypes.TEXT, allowNull: false },
      objectId: { type: DataTypes.TEXT, allowNull: false },
      receivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'PaymentEvent', tableName: 'payment_events' },
  );
}
