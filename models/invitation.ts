import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** A one-time way in for a person of the team. Only the hash of its token is kept. */
export class Invitation extends Model<InferAttributes<Invitation>, InferCreationAttributes<Invitation>> {
  declare teamId: string;
  declare id: CreationOptional<string>;
  declare personId: string;
  declare tokenHash: string;
  declare invitedBy: string;
  declare createdAt: CreationOptional<Date>;
  declare expiresAt: Date;
  /** when it was used, or replaced by a newer one */
  declare usedAt: CreationOptional<Date | null>;
}
Invitation.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    personId: { type: DataTypes.UUID, allowNull: false },
    tokenHash: { type: DataTypes.CHAR(64), allowNull: false },
    invitedBy: { type: DataTypes.UUID, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    expiresAt: { type: DataTypes.DATE, allowNull: false },
    usedAt: { type: DataTypes.DATE },
  },
  { sequelize, modelName: 'Invitation', tableName: 'invitations' },
);
