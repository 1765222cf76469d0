import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class SheetEvent extends Model<InferAttributes<SheetEvent>, InferCreationAttributes<SheetEvent>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare sheetId: string;
  declare membershipId: string;
  declare personName: string;
  declare protocol: number;
  declare kind: string;
  declare target: CreationOptional<string>;
  declare body: CreationOptional<Record<string, unknown>>;
  declare bodySha256: string;
  declare answer: CreationOptional<Record<string, unknown>>;
  declare at: Date;
  declare receivedAt: CreationOptional<Date>;
}

export function initSheetEvent(sequelize: Sequelize): void {
  SheetEvent.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      sheetId: { type: DataTypes.UUID, allowNull: false },
      membershipId: { type: DataTypes.UUID, allowNull: false },
      personName: { type: DataTypes.TEXT, allowNull: false },
      protocol: { type: DataTypes.INTEGER, allowNull: false },
      kind: { type: DataTypes.TEXT, allowNull: false },
      target: { type: DataTypes.TEXT },
      body: { type: DataTypes.JSONB },
      bodySha256: { type: DataTypes.TEXT, allowNull: false },
      answer: { type: DataTypes.JSONB },
      at: { type: DataTypes.DATE, allowNull: false },
      receivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'SheetEvent', tableName: 'sheet_events' },
  );
}
