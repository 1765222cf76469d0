import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class VisitCrew extends Model<InferAttributes<VisitCrew>, InferCreationAttributes<VisitCrew>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare visitId: string;
  declare membershipId: string;
}

export function initVisitCrew(sequelize: Sequelize): void {
  VisitCrew.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      visitId: { type: DataTypes.UUID, allowNull: false },
      membershipId: { type: DataTypes.UUID, allowNull: false },
    },
    { sequelize, modelName: 'VisitCrew', tableName: 'visit_crew' },
  );
}
