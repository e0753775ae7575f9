import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** A stream through which somebody has a drawing open; gone, or no longer fresh, when they leave. */
export class Presence extends Model<InferAttributes<Presence>, InferCreationAttributes<Presence>> {
  declare teamId: string;
  declare drawingId: string;
  declare streamId: string;
  declare personId: string;
  declare seenAt: CreationOptional<Date>;
}
Presence.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    drawingId: { type: DataTypes.UUID, primaryKey: true },
    streamId: { type: DataTypes.UUID, primaryKey: true },
    personId: { type: DataTypes.UUID, allowNull: false },
    seenAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: 'Presence', tableName: 'presences' },
);
