import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class IdempotencyKey extends Model<
  InferAttributes<IdempotencyKey>,
  InferCreationAttributes<IdempotencyKey>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare scope: string;
  declare key: string;
  declare requestSha256: string;
  declare response: CreationOptional<Record<string, unknown> | null>;
  declare createdAt: CreationOptional<Date>;
}

export function initIdempotencyKey(sequelize: Sequelize): void {
  IdempotencyKey.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      scope: { type: DataTypes.TEXT, allowNull: false },
      key: { type: DataTypes.TEXT, allowNull: false },
      requestSha256: { type: DataTypes.TEXT, allowNull: false },
      response: { type: DataTypes.JSONB },
      createdAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'IdempotencyKey', tableName: 'idempotency_keys' },
  );
}
