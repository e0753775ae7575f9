import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from 'sequelize';
import type { Person } from './person';
import { sequelize } from './sequelize';

/** A recorded state of a drawing, lettered A, B, C: it stays for ever. */
export class Revision extends Model<InferAttributes<Revision>, InferCreationAttributes<Revision>> {
  declare teamId: string;
  declare id: CreationOptional<string>;
  declare drawingId: string;
  declare letter: string;
  declare rev: number;
  declare note: string;
  declare state: CreationOptional<'draft' | 'submitted' | 'returned' | 'approved' | 'issued'>;
  /** of the frozen document */
  declare sha256: string;
  declare personId: string;
  declare at: CreationOptional<Date>;
  /** present only when included */
  declare person?: NonAttribute<Person>;
}
Revision.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    drawingId: { type: DataTypes.UUID, allowNull: false },
    letter: { type: DataTypes.STRING(3), allowNull: false },
    rev: { type: DataTypes.INTEGER, allowNull: false },
    note: { type: DataTypes.STRING(200), allowNull: false },
    state: { type: DataTypes.STRING(9), allowNull: false, defaultValue: 'draft' },
    sha256: { type: DataTypes.CHAR(64), allowNull: false },
    personId: { type: DataTypes.UUID, allowNull: false },
    at: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: 'Revision', tableName: 'revisions' },
);
