import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class StoredFile extends Model<InferAttributes<StoredFile>, InferCreationAttributes<StoredFile>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare sha256: string;
  declare contentType: string;
  declare bytes: string;
  declare name: CreationOptional<string>;
  declare capturedAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

export function initStoredFile(sequelize: Sequelize): void {
  StoredFile.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      sha256: { type: DataTypes.TEXT, allowNull: false },
      contentType: { type: DataTypes.TEXT, allowNull: false },
      bytes: { type: DataTypes.BIGINT, allowNull: false },
      name: { type: DataTypes.TEXT },
      capturedAt: { type: DataTypes.DATE },
      createdAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'StoredFile', tableName: 'files' },
  );
}
