import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class PublishedDocument extends Model<
  InferAttributes<PublishedDocument>,
  InferCreationAttributes<PublishedDocument>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare kind: string;
  declare number: string;
  declare revision: CreationOptional<number>;
  declare title: CreationOptional<string>;
  declare canonical: string;
  declare sha256: string;
  declare pdfSha256: CreationOptional<string | null>;
  declare amountMinor: CreationOptional<string | null>;
  declare currency: CreationOptional<string | null>;
  declare dueOn: CreationOptional<string | null>;
  declare validUntil: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare createdBy: CreationOptional<string | null>;
}

export function initPublishedDocument(sequelize: Sequelize): void {
  PublishedDocument.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      kind: { type: DataTypes.TEXT, allowNull: false },
      number: { type: DataTypes.TEXT, allowNull: false },
      revision: { type: DataTypes.INTEGER },
      title: { type: DataTypes.TEXT },
      canonical: { type: DataTypes.TEXT, allowNull: false },
      sha256: { type: DataTypes.TEXT, allowNull: false },
      pdfSha256: { type: DataTypes.TEXT },
      amountMinor: { type: DataTypes.BIGINT },
      currency: { type: DataTypes.CHAR(3) },
      dueOn: { type: DataTypes.DATEONLY },
      validUntil: { type: DataTypes.DATEONLY },
      createdAt: { type: DataTypes.DATE },
      createdBy: { type: DataTypes.UUID },
    },
    { sequelize, modelName: 'PublishedDocument', tableName: 'documents' },
  );
}
