import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** A firm or a training centre. Nothing crosses teams. */
export class Team extends Model<InferAttributes<Team>, InferCreationAttributes<Team>> {
  declare id: CreationOptional<string>;
  declare name: string;
  /** letters before the numbers of its jobs */
  declare prefix: CreationOptional<string>;
  declare nextJob: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
}
Team.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    name: { type: DataTypes.STRING(120), allowNull: false },
    prefix: { type: DataTypes.STRING(6), allowNull: false, defaultValue: 'OH' },
    nextJob: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: 'Team', tableName: 'teams' },
);
