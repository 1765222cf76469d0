import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class LuminaireType extends Model<
  InferAttributes<LuminaireType>,
  InferCreationAttributes<LuminaireType>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare name: string;
  declare watts: string;
  declare wattsSource: string;
  declare ballast: string;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initLuminaireType(sequelize: Sequelize): void {
  LuminaireType.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      watts: { type: DataTypes.DECIMAL(14, 4), allowNull: false },
      wattsSource: { type: DataTypes.TEXT, allowNull: false },
      ballast: { type: DataTypes.TEXT, allowNull: false },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'LuminaireType', tableName: 'luminaire_types' },
  );
}
