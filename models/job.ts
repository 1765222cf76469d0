import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Job extends Model<InferAttributes<Job>, InferCreationAttributes<Job>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare number: string;
  declare customerId: string;
  declare siteId: string;
  declare title: string;
  declare stage: CreationOptional<string>;
  declare surveyDoneAt: CreationOptional<Date | null>;
  declare parkedUntil: CreationOptional<string | null>;
  declare parkedReason: CreationOptional<string>;
  declare notGoingAheadAt: CreationOptional<Date | null>;
  declare notGoingAheadReason: CreationOptional<string>;
  declare depositRule: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

export function initJob(sequelize: Sequelize): void {
  Job.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      number: { type: DataTypes.BIGINT, allowNull: false },
      customerId: { type: DataTypes.UUID, allowNull: false },
      siteId: { type: DataTypes.UUID, allowNull: false },
      title: { type: DataTypes.TEXT, allowNull: false },
      stage: { type: DataTypes.TEXT },
      surveyDoneAt: { type: DataTypes.DATE },
      parkedUntil: { type: DataTypes.DATEONLY },
      parkedReason: { type: DataTypes.TEXT },
      notGoingAheadAt: { type: DataTypes.DATE },
      notGoingAheadReason: { type: DataTypes.TEXT },
      depositRule: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
      createdAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Job', tableName: 'jobs' },
  );
}
