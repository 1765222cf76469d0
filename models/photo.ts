import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class Photo extends Model<InferAttributes<Photo>, InferCreationAttributes<Photo>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare subjectType: string;
  declare subjectId: string;
  declare fileSha256: string;
  declare caption: CreationOptional<string>;
  declare capturedAt: CreationOptional<Date | null>;
  declare membershipId: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initPhoto(sequelize: Sequelize): void {
  Photo.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      subjectType: { type: DataTypes.TEXT, allowNull: false },
      subjectId: { type: DataTypes.UUID, allowNull: false },
      fileSha256: { type: DataTypes.TEXT, allowNull: false },
      caption: { type: DataTypes.TEXT },
      capturedAt: { type: DataTypes.DATE },
      membershipId: { type: DataTypes.UUID },
      createdAt: { type: DataTypes.DATE },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Photo', tableName: 'photos' },
  );
}
