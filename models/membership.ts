import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** A role that a person holds; one row a role. */
export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  declare teamId: string;
  declare personId: string;
  declare role: 'apprentice' | 'electrician' | 'trainer' | 'admin';
  declare grantedAt: CreationOptional<Date>;
}
Membership.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    personId: { type: DataTypes.UUID, primaryKey: true },
    role: { type: DataTypes.STRING(12), primaryKey: true },
    grantedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: 'Membership', tableName: 'memberships' },
);
