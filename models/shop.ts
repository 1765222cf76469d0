import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

/** A shop's row is its settings; there is no shop_id beside its id. */
export class Shop extends Model<InferAttributes<Shop>, InferCreationAttributes<Shop>> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare licenceNumber: CreationOptional<string>;
  declare email: CreationOptional<string>;
  declare phone: CreationOptional<string>;
  declare address: CreationOptional<string>;
  declare basis: CreationOptional<'us' | 'iec'>;
  declare basisEdition: CreationOptional<string>;
  declare units: CreationOptional<'us' | 'metric'>;
  declare currency: CreationOptional<string>;
  declare locale: CreationOptional<string>;
  declare timeZone: CreationOptional<string>;
  declare paper: CreationOptional<'letter' | 'a4'>;
  declare taxRounding: CreationOptional<'line' | 'document'>;
  declare taxName: CreationOptional<string>;
  declare taxRatePct: CreationOptional<string>;
  declare depositPct: CreationOptional<string>;
  declare markupPct: CreationOptional<string>;
  declare labourRate: CreationOptional<string>;
  declare quoteValidDays: CreationOptional<number>;
  declare cardCeilingMinor: CreationOptional<string>;
  declare benchWork: CreationOptional<boolean>;
  declare stripeAccount: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
}

export function initShop(sequelize: Sequelize): void {
  Shop.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      name: { type: DataTypes.TEXT },
      licenceNumber: { type: DataTypes.TEXT },
      email: { type: DataTypes.TEXT },
      phone: { type: DataTypes.TEXT },
      address: { type: DataTypes.TEXT },
      basis: { type: DataTypes.TEXT },
      basisEdition: { type: DataTypes.TEXT },
      units: { type: DataTypes.TEXT },
      currency: { type: DataTypes.CHAR(3) },
      locale: { type: DataTypes.TEXT },
      timeZone: { type: DataTypes.TEXT },
      paper: { type: DataTypes.TEXT },
      taxRounding: { type: DataTypes.TEXT },
      taxName: { type: DataTypes.TEXT },
      taxRatePct: { type: DataTypes.DECIMAL(9, 6) },
      depositPct: { type: DataTypes.DECIMAL(9, 6) },
      markupPct: { type: DataTypes.DECIMAL(9, 6) },
      labourRate: { type: DataTypes.DECIMAL(18, 6) },
      quoteValidDays: { type: DataTypes.INTEGER },
      cardCeilingMinor: { type: DataTypes.BIGINT },
      benchWork: { type: DataTypes.BOOLEAN },
      stripeAccount: { type: DataTypes.TEXT },
      version: { type: DataTypes.INTEGER },
      createdAt: { type: DataTypes.DATE },
    },
    { sequelize, modelName: 'Shop', tableName: 'shops' },
  );
}
