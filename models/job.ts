import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from 'sequelize';
import type { Client } from './client';
import type { Drawing } from './drawing';
import { sequelize } from './sequelize';

/** A home to be drawn for a client. Its practice and supply stand in the drawing and nowhere else. */
export class Job extends Model<InferAttributes<Job>, InferCreationAttributes<Job>> {
  declare teamId: string;
  declare id: CreationOptional<string>;
  /** counts up in the team */
  declare number: number;
  declare title: string;
  declare clientId: string;
  declare address: string;
  /** h on battery, 0 without backup */
  declare hoursWanted: number;
  /** ISO date */
  declare due: string | null;
  declare archivedAt: CreationOptional<Date | null>;
  /** grows by one an edit; an edit made on an older one is refused */
  declare version: CreationOptional<number>;
  declare createdBy: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  /** present only when included */
  declare client?: NonAttribute<Client>;
  declare drawing?: NonAttribute<Drawing>;
}
Job.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    number: { type: DataTypes.INTEGER, allowNull: false },
    title: { type: DataTypes.STRING(120), allowNull: false },
    clientId: { type: DataTypes.UUID, allowNull: false },
    address: { type: DataTypes.STRING(300), allowNull: false },
    hoursWanted: { type: DataTypes.DOUBLE, allowNull: false },
    due: { type: DataTypes.DATEONLY },
    archivedAt: { type: DataTypes.DATE },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdBy: { type: DataTypes.UUID, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: 'Job', tableName: 'jobs' },
);
