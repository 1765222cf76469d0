import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Circuit extends Model<InferAttributes<Circuit>, InferCreationAttributes<Circuit>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare areaId: string;
  declare coveId: CreationOptional<string | null>;
  declare kind: string;
  declare name: string;
  declare electrical: Record<string, unknown>;
  declare choices: CreationOptional<Record<string, unknown>>;
  declare engineInput: CreationOptional<Record<string, unknown> | null>;
  declare answer: CreationOptional<Record<string, unknown> | null>;
  declare answeredAt: CreationOptional<Date | null>;
  declare openStops: CreationOptional<number>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initCircuit(sequelize: Sequelize): void {
  Circuit.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      areaId: { type: DataTypes.UUID, allowNull: false },
      coveId: { type: DataTypes.UUID },
      kind: { type: DataTypes.TEXT, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      electrical: { type: DataTypes.JSONB, allowNull: false },
      choices: { type: DataTypes.JSONB },
      engineInput: { type: DataTypes.JSONB },
      answer: { type: DataTypes.JSONB },
      answeredAt: { type: DataTypes.DATE },
      openStops: { type: DataTypes.INTEGER },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Circuit', tableName: 'circuits' },
  );
}
