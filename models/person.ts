import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from 'sequelize';
import type { Login } from './login';
import type { Membership } from './membership';
import { sequelize } from './sequelize';

/** Somebody of a team. How they sign in is a row of its own, so that no list of people ever carries a secret. */
export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
  declare teamId: string;
  declare id: CreationOptional<string>;
  declare name: string;
  declare active: CreationOptional<boolean>;
  declare createdAt: CreationOptional<Date>;
  /** present only when included */
  declare memberships?: NonAttribute<Membership[]>;
  declare login?: NonAttribute<Login>;
}
Person.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    name: { type: DataTypes.STRING(80), allowNull: false },
    active: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: 'Person', tableName: 'people' },
);
