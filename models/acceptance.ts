import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Acceptance extends Model<InferAttributes<Acceptance>, InferCreationAttributes<Acceptance>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare documentId: string;
  declare method: string;
  declare name: string;
  declare choices: CreationOptional<string[]>;
  declare totalMinor: string;
  declare currency: string;
  declare shownText: string;
  declare canonical: string;
  declare sha256: string;
  declare address: CreationOptional<string>;
  declare userAgent: CreationOptional<string>;
  declare at: CreationOptional<Date>;
  declare recordedBy: CreationOptional<string | null>;
}

export function initAcceptance(sequelize: Sequelize): void {
  Acceptance.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      documentId: { type: DataTypes.UUID, allowNull: false },
      method: { type: DataTypes.TEXT, allowNull: false },
      name: { type: DataTypes.TEXT, allowNull: false },
      choices: { type: DataTypes.JSONB },
      totalMinor: { type: DataTypes.BIGINT, allowNull: false },
      currency: { type: DataTypes.CHAR(3), allowNull: false },
      shownText: { type: DataTypes.TEXT, allowNull: false },
      canonical: { type: DataTypes.TEXT, allowNull: false },
      sha256: { type: DataTypes.TEXT, allowNull: false },
      address: { type: DataTypes.TEXT },
      userAgent: { type: DataTypes.TEXT },
      at: { type: DataTypes.DATE },
      recordedBy: { type: DataTypes.UUID },
    },
    { sequelize, modelName: 'Acceptance', tableName: 'acceptances' },
  );
}
