import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** The e-mail address under which a person signs in: one team each. */
export class Login extends Model<InferAttributes<Login>, InferCreationAttributes<Login>> {
  /** lower case, ASCII */
  declare email: string;
  declare teamId: string;
  declare personId: string;
  /** argon2id; none until the invitation is accepted, or where only single sign-on is used */
  declare passwordHash: CreationOptional<string | null>;
  declare passwordAt: CreationOptional<Date | null>;
}
Login.init(
  {
    email: { type: DataTypes.STRING(254), primaryKey: true },
    teamId: { type: DataTypes.UUID, allowNull: false },
    personId: { type: DataTypes.UUID, allowNull: false },
    passwordHash: { type: DataTypes.TEXT },
    passwordAt: { type: DataTypes.DATE },
  },
  { sequelize, modelName: 'Login', tableName: 'logins' },
);
