import { DataTypes, Model, type InferAttributes, type InferCreationAttributes, type NonAttribute } from 'sequelize';
import type { Person } from './person';
import { sequelize } from './sequelize';

/** One saved command of a drawing; written once. */
export class DrawingChange extends Model<InferAttributes<DrawingChange>, InferCreationAttributes<DrawingChange>> {
  declare teamId: string;
  declare drawingId: string;
  declare rev: number;
  /** made by the window that drew it: a retry carries the same one */
  declare saveId: string;
  declare personId: string;
  declare at: Date;
  declare label: string;
  /** JSON, byte for byte what the hash covers */
  declare patch: string;
  declare prevHash: string;
  declare hash: string;
  /** present only when included */
  declare person?: NonAttribute<Person>;
}
DrawingChange.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    drawingId: { type: DataTypes.UUID, primaryKey: true },
    rev: { type: DataTypes.INTEGER, primaryKey: true },
    saveId: { type: DataTypes.UUID, allowNull: false },
    personId: { type: DataTypes.UUID, allowNull: false },
    at: { type: DataTypes.DATE(3), allowNull: false },
    label: { type: DataTypes.STRING(160), allowNull: false },
    patch: { type: DataTypes.TEXT, allowNull: false },
    prevHash: { type: DataTypes.CHAR(64), allowNull: false },
    hash: { type: DataTypes.CHAR(64), allowNull: false },
  },
  { sequelize, modelName: 'DrawingChange', tableName: 'drawing_changes' },
);
