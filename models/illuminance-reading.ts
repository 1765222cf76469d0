import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class IlluminanceReading extends Model<
  InferAttributes<IlluminanceReading>,
  InferCreationAttributes<IlluminanceReading>
> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  declare areaId: string;
  declare place: string;
  declare lux: CreationOptional<string | null>;
  declare taken: string;
  declare daylight: CreationOptional<string>;
  declare meter: CreationOptional<string>;
  declare calibratedOn: CreationOptional<string | null>;
  declare readAt: Date;
  declare notes: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initIlluminanceReading(sequelize: Sequelize): void {
  IlluminanceReading.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      jobId: { type: DataTypes.UUID, allowNull: false },
      areaId: { type: DataTypes.UUID, allowNull: false },
      place: { type: DataTypes.TEXT, allowNull: false },
      lux: { type: DataTypes.DECIMAL(14, 4) },
      taken: { type: DataTypes.TEXT, allowNull: false },
      daylight: { type: DataTypes.TEXT },
      meter: { type: DataTypes.TEXT },
      calibratedOn: { type: DataTypes.DATEONLY },
      readAt: { type: DataTypes.DATE, allowNull: false },
      notes: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      archivedAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'IlluminanceReading', tableName: 'illuminance_readings' },
  );
}
