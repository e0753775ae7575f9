import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** The narrow head of a drawing. The home itself is its newest snapshot and the changes after it. */
export class Drawing extends Model<InferAttributes<Drawing>, InferCreationAttributes<Drawing>> {
  declare teamId: string;
  declare id: CreationOptional<string>;
  declare jobId: string;
  /** number of the newest change; 0 before the first */
  declare rev: CreationOptional<number>;
  declare state: CreationOptional<'open' | 'submitted' | 'issued'>;
  declare snapshotRev: CreationOptional<number>;
  /** hash of the newest change, or of the first snapshot: the next change is chained to it */
  declare headHash: string;
}
Drawing.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    jobId: { type: DataTypes.UUID, allowNull: false },
    rev: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    state: { type: DataTypes.STRING(9), allowNull: false, defaultValue: 'open' },
    snapshotRev: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    headHash: { type: DataTypes.CHAR(64), allowNull: false },
  },
  { sequelize, modelName: 'Drawing', tableName: 'drawings' },
);
