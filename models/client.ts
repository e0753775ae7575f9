import { DataTypes, Model, type CreationOptional, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** Who a job is done for. A name is one client in a team, whatever its capitals. */
export class Client extends Model<InferAttributes<Client>, InferCreationAttributes<Client>> {
  declare teamId: string;
  declare id: CreationOptional<string>;
  declare name: string;
  declare phone: CreationOptional<string>;
  declare email: CreationOptional<string>;
  declare createdAt: CreationOptional<Date>;
}
Client.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    name: { type: DataTypes.STRING(120), allowNull: false },
    phone: { type: DataTypes.STRING(40), allowNull: false, defaultValue: '' },
    email: { type: DataTypes.STRING(254), allowNull: false, defaultValue: '' },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: 'Client', tableName: 'clients' },
);
