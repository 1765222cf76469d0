import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class UtilityAccount extends Model<
  InferAttributes<UtilityAccount>,
  InferCreationAttributes<UtilityAccount>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare utility: string;
  declare accountNumber: CreationOptional<string>;
  declare rateSchedule: CreationOptional<string>;
  declare energyRate: CreationOptional<string | null>;
  declare blended: CreationOptional<boolean>;
  declare demandRate: CreationOptional<string | null>;
  declare bills: CreationOptional<unknown[]>;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initUtilityAccount(sequelize: Sequelize): void {
  UtilityAccount.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      utility: { type: DataTypes.TEXT, allowNull: false },
      accountNumber: { type: DataTypes.TEXT },
      rateSchedule: { type: DataTypes.TEXT },
      energyRate: { type: DataTypes.DECIMAL(18, 6) },
      blended: { type: DataTypes.BOOLEAN },
      demandRate: { type: DataTypes.DECIMAL(18, 6) },
      bills: { type: DataTypes.JSONB },
      notes: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'UtilityAccount', tableName: 'utility_accounts' },
  );
}
