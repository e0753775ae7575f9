import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** Who did what to what, when. Rows are added and read; the database refuses anything else. */
export class AuditEntry extends Model<InferAttributes<AuditEntry>, InferCreationAttributes<AuditEntry>> {
  declare teamId: string;
  declare id: CreationOptional<string>;
  declare at: CreationOptional<Date>;
  /** nobody, where a stranger tried */
  declare personId: string | null;
  /** "people.invite" */
  declare action: string;
  declare subjectId: string | null;
  declare detail: Record<string, unknown>;
}
AuditEntry.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    id: { type: DataTypes.BIGINT, primaryKey: true, autoIncrement: true },
    at: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    personId: { type: DataTypes.UUID },
    action: { type: DataTypes.STRING(40), allowNull: false },
    subjectId: { type: DataTypes.UUID },
    detail: { type: DataTypes.JSONB, allowNull: false },
  },
  { sequelize, modelName: 'AuditEntry', tableName: 'audit_entries' },
);
