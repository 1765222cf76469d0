import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Visit extends Model<InferAttributes<Visit>, InferCreationAttributes<Visit>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare startsAt: string;
  declare endsAt: string;
  declare timeZone: string;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initVisit(sequelize: Sequelize): void {
  Visit.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      startsAt: { type: 'TIMESTAMP', allowNull: false },
      endsAt: { type: 'TIMESTAMP', allowNull: false },
      timeZone: { type: DataTypes.TEXT, allowNull: false },
      notes: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Visit', tableName: 'visits' },
  );
}
