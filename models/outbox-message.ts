import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class OutboxMessage extends Model<
  InferAttributes<OutboxMessage>,
  InferCreationAttributes<OutboxMessage>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare kind: string;
  declare payload: CreationOptional<Record<string, unknown>>;
  declare createdAt: CreationOptional<Date>;
  declare runAfter: CreationOptional<Date>;
  declare relayedAt: CreationOptional<Date | null>;
  declare doneAt: CreationOptional<Date | null>;
  declare failedAt: CreationOptional<Date | null>;
  declare failure: CreationOptional<string | null>;
}

export function initOutboxMessage(sequelize: Sequelize): void {
  OutboxMessage.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      kind: { type: DataTypes.TEXT, allowNull: false },
      payload: { type: DataTypes.JSONB },
      createdAt: { type: DataTypes.DATE },
      runAfter: { type: DataTypes.DATE },
      relayedAt: { type: DataTypes.DATE },
      doneAt: { type: DataTypes.DATE },
      failedAt: { type: DataTypes.DATE },
      failure: { type: DataTypes.TEXT },
    },
    { sequelize, modelName: 'OutboxMessage', tableName: 'outbox' },
  );
}
