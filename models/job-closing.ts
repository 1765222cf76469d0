import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class JobClosing extends Model<InferAttributes<JobClosing>, InferCreationAttributes<JobClosing>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare membershipId: string;
  declare note: CreationOptional<string>;
  declare at: CreationOptional<Date>;
}

export function initJobClosing(sequelize: Sequelize): void {
  JobClosing.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      membershipId: { type: DataTypes.UUID, allowNull: false },
      note: { type: DataTypes.TEXT },
      at: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'JobClosing', tableName: 'job_closings' },
  );
}
