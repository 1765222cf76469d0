import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Counter extends Model<InferAttributes<Counter>, InferCreationAttributes<Counter>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare name: string;
  declare value: CreationOptional<string>;
}

export function initCounter(sequelize: Sequelize): void {
  Counter.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      name: { type: DataTypes.TEXT, allowNull: false },
      value: { type: DataTypes.BIGINT },
    },
    { sequelize, modelName: 'Counter', tableName: 'counters' },
  );
}
