import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class DocumentEvent extends Model<
  InferAttributes<DocumentEvent>,
  InferCreationAttributes<DocumentEvent>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare documentId: string;
  declare kind: string;
  declare at: CreationOptional<Date>;
  declare membershipId: CreationOptional<string | null>;
  declare detail: CreationOptional<Record<string, unknown>>;
}

export function initDocumentEvent(sequelize: Sequelize): void {
  DocumentEvent.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      documentId: { type: DataTypes.UUID, allowNull: false },
      kind: { type: DataTypes.TEXT, allowNull: false },
      at: { type: DataTypes.DATE },
      membershipId: { type: DataTypes.UUID },
      detail: { type: DataTypes.JSONB },
    },
    { sequelize, modelName: 'DocumentEvent', tableName: 'document_events' },
  );
}
