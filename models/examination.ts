import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** How many findings a drawing had when it was last examined: what the register of jobs shows. */
export class Examination extends Model<InferAttributes<Examination>, InferCreationAttributes<Examination>> {
  declare teamId: string;
  declare drawingId: string;
  /** the state of the drawing that was examined */
  declare rev: number;
  declare danger: number;
  declare defect: number;
  declare advice: number;
  declare at: CreationOptional<Date>;
}
Examination.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    drawingId: { type: DataTypes.UUID, primaryKey: true },
    rev: { type: DataTypes.INTEGER, allowNull: false },
    danger: { type: DataTypes.INTEGER, allowNull: false },
    defect: { type: DataTypes.INTEGER, allowNull: false },
    advice: { type: DataTypes.INTEGER, allowNull: false },
    at: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: 'Examination', tableName: 'examinations' },
);
