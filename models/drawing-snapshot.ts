import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** The whole document at a revision of the drawing; written once. */
export class DrawingSnapshot extends Model<InferAttributes<DrawingSnapshot>, InferCreationAttributes<DrawingSnapshot>> {
  declare teamId: string;
  declare drawingId: string;
  declare rev: number;
  /** JSON in canonical order */
  declare body: string;
  declare sha256: string;
  declare at: CreationOptional<Date>;
}
DrawingSnapshot.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    drawingId: { type: DataTypes.UUID, primaryKey: true },
    rev: { type: DataTypes.INTEGER, primaryKey: true },
    body: { type: DataTypes.TEXT, allowNull: false },
    sha256: { type: DataTypes.CHAR(64), allowNull: false },
    at: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: 'DrawingSnapshot', tableName: 'drawing_snapshots' },
);
