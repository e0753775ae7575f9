import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** One sign-in. The cookie only names it: it is read on every request, so that an ended one is dead at once. */
export class AuthSession extends Model<InferAttributes<AuthSession>, InferCreationAttributes<AuthSession>> {
  declare teamId: string;
  declare id: CreationOptional<string>;
  declare personId: string;
  declare createdAt: CreationOptional<Date>;
  declare seenAt: CreationOptional<Date>;
  declare expiresAt: Date;
  declare endedAt: CreationOptional<Date | null>;
  declare endedBy: CreationOptional<'sign-out' | 'everywhere' | 'password' | 'admin' | null>;
}
AuthSession.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    personId: { type: DataTypes.UUID, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    seenAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    expiresAt: { type: DataTypes.DATE, allowNull: false },
    endedAt: { type: DataTypes.DATE },
    endedBy: { type: DataTypes.STRING(12) },
  },
  { sequelize, modelName: 'AuthSession', tableName: 'auth_sessions' },
);
