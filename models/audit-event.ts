import {
  type CreationOptional,
  DataTypes,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';

export class AuditEvent extends Model<InferAttributes<AuditEvent>, InferCreationAttributes<AuditEvent>> {
  declare shopId: string;
  declare id: CreationOptional<string>;
  declare at: CreationOptional<Date>;
  declare membershipId: CreationOptional<string | null>;
  declare actor: string;
  declare action: string;
  declare subjectType: string;
  declare subjectId: CreationOptional<string | null>;
  declare change: CreationOptional<Record<string, unknown>>;
}

export function initAuditEvent(sequelize: Sequelize): void {
  AuditEvent.init(
    {
      shopId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      at: { type: DataTypes.DATE },
      membershipId: { type: DataTypes.UUID },
      actor: { type: DataTypes.TEXT, allowNull: false },
      action: { type: DataTypes.TEXT, allowNull: false },
      subjectType: { type: DataTypes.TEXT, allowNull: false },
      subjectId: { type: DataTypes.UUID },
      change: { type: DataTypes.JSONB },
    },
    { sequelize, modelName: 'AuditEvent', tableName: 'audit_events' },
  );
}
