import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class ClientEvent extends Model<InferAttributes<ClientEvent>, InferCreationAttributes<ClientEvent>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare membershipId: string;
  declare protocol: number;
  declare kind: string;
  declare entityId: string;
  declare bodySha256: string;
  declare answer: Record<string, unknown>;
  declare at: Date;
  declare receivedAt: CreationOptional<Date>;
}

export function initClientEvent(sequelize: Sequelize): void {
  ClientEvent.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      membershipId: { type: DataTypes.UUID, allowNull: false },
      protocol: { type: DataTypes.INTEGER, allowNull: false },
      kind: { type: DataTypes.TEXT, allowNull: false },
      entityId: { type: DataTypes.UUID, allowNull: false },
      bodySha256: { type: DataTypes.TEXT, allowNull: false },
      answer: { type: DataTypes.JSONB, allowNull: false },
      at: { type: DataTypes.DATE, allowNull: false },
      receivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'ClientEvent', tableName: 'client_events' },
  );
}
