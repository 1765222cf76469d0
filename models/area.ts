import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Area extends Model<InferAttributes<Area>, InferCreationAttributes<Area>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare position: CreationOptional<number>;
  declare name: string;
  declare use: CreationOptional<string>;
  declare lengthMetres: CreationOptional<string | null>;
  declare widthMetres: CreationOptional<string | null>;
  declare heightMetres: CreationOptional<string | null>;
  declare weeklyHours: CreationOptional<string | null>;
  declare ambientCelsius: CreationOptional<string | null>;
  declare environment: CreationOptional<string>;
  declare hazards: CreationOptional<Record<string, unknown>>;
  declare details: CreationOptional<Record<string, unknown>>;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initArea(sequelize: Sequelize): void {
  Area.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      position: { type: DataTypes.INTEGER },
      name: { type: DataTypes.TEXT, allowNull: false },
      use: { type: DataTypes.TEXT },
      lengthMetres: { type: DataTypes.DECIMAL(14, 4) },
      widthMetres: { type: DataTypes.DECIMAL(14, 4) },
      heightMetres: { type: DataTypes.DECIMAL(14, 4) },
      weeklyHours: { type: DataTypes.DECIMAL(14, 4) },
      ambientCelsius: { type: DataTypes.DECIMAL(14, 4) },
      environment: { type: DataTypes.TEXT },
      hazards: { type: DataTypes.JSONB },
      details: { type: DataTypes.JSONB },
      notes: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Area', tableName: 'areas' },
  );
}
