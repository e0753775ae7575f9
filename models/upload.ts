import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes, type NonAttribute } from 'sequelize';
import type { Person } from './person';
import { sequelize } from './sequelize';

/** A photograph or plan of a job, as it was stored after being read and written anew. */
export class Upload extends Model<InferAttributes<Upload>, InferCreationAttributes<Upload>> {
  declare teamId: string;
  /** made by the window that sent it: a retry carries the same one */
  declare id: string;
  declare jobId: string;
  declare personId: string;
  declare subject: 'board' | 'meter' | 'room' | 'plan' | 'other';
  /** id of the room in the drawing, where it shows one */
  declare place: string | null;
  declare caption: string;
  /** px */
  declare width: number;
  declare height: number;
  /** of the large picture */
  declare bytes: number;
  /** of what was sent, to know a retry */
  declare sha256: string;
  declare at: CreationOptional<Date>;
  declare storedAt: CreationOptional<Date | null>;
  declare removedAt: CreationOptional<Date | null>;
  /** present only when included */
  declare person?: NonAttribute<Person>;
}
Upload.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    id: { type: DataTypes.UUID, primaryKey: true },
    jobId: { type: DataTypes.UUID, allowNull: false },
    personId: { type: DataTypes.UUID, allowNull: false },
    subject: { type: DataTypes.STRING(8), allowNull: false },
    place: { type: DataTypes.STRING(64) },
    caption: { type: DataTypes.STRING(200), allowNull: false },
    width: { type: DataTypes.INTEGER, allowNull: false },
    height: { type: DataTypes.INTEGER, allowNull: false },
    bytes: { type: DataTypes.INTEGER, allowNull: false },
    sha256: { type: DataTypes.CHAR(64), allowNull: false },
    at: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    storedAt: { type: DataTypes.DATE },
    removedAt: { type: DataTypes.DATE },
  },
  { sequelize, modelName: 'Upload', tableName: 'uploads' },
);
