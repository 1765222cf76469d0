import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class ChangeLine extends Model<InferAttributes<ChangeLine>, InferCreationAttributes<ChangeLine>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare areaId: string;
  declare existingLuminaireId: CreationOptional<string | null>;
  declare circuitId: CreationOptional<string | null>;
  declare position: CreationOptional<number>;
  declare action: string;
  declare oldQuantity: CreationOptional<string>;
  declare newPartId: CreationOptional<string | null>;
  declare newType: CreationOptional<string>;
  declare newQuantity: CreationOptional<string>;
  declare newWatts: CreationOptional<string | null>;
  declare electrical: CreationOptional<Record<string, unknown>>;
  declare engineInput: CreationOptional<Record<string, unknown> | null>;
  declare answer: CreationOptional<Record<string, unknown> | null>;
  declare answeredAt: CreationOptional<Date | null>;
  declare openStops: CreationOptional<number>;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initChangeLine(sequelize: Sequelize): void {
  ChangeLine.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      areaId: { type: DataTypes.UUID, allowNull: false },
      existingLuminaireId: { type: DataTypes.UUID },
      circuitId: { type: DataTypes.UUID },
      position: { type: DataTypes.INTEGER },
      action: { type: DataTypes.TEXT, allowNull: false },
      oldQuantity: { type: DataTypes.DECIMAL(14, 4) },
      newPartId: { type: DataTypes.UUID },
      newType: { type: DataTypes.TEXT },
      newQuantity: { type: DataTypes.DECIMAL(14, 4) },
      newWatts: { type: DataTypes.DECIMAL(14, 4) },
      electrical: { type: DataTypes.JSONB },
      engineInput: { type: DataTypes.JSONB },
      answer: { type: DataTypes.JSONB },
      answeredAt: { type: DataTypes.DATE },
      openStops: { type: DataTypes.INTEGER },
      notes: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'ChangeLine', tableName: 'change_lines' },
  );
}
