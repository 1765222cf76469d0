import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class FindingOverride extends Model<
  InferAttributes<FindingOverride>,
  InferCreationAttributes<FindingOverride>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare subjectType: string;
  declare subjectId: string;
  declare code: string;
  declare reason: string;
  declare membershipId: string;
  declare personName: string;
  declare licenceNumber: string;
  declare at: CreationOptional<Date>;
}

export function initFindingOverride(sequelize: Sequelize): void {
  FindingOverride.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      subjectType: { type: DataTypes.TEXT, allowNull: false },
      subjectId: { type: DataTypes.UUID, allowNull: false },
      code: { type: DataTypes.TEXT, allowNull: false },
      reason: { type: DataTypes.TEXT, allowNull: false },
      membershipId: { type: DataTypes.UUID, allowNull: false },
      personName: { type: DataTypes.TEXT, allowNull: false },
      licenceNumber: { type: DataTypes.TEXT, allowNull: false },
      at: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'FindingOverride', tableName: 'finding_overrides' },
  );
}
