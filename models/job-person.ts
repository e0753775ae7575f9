import { DataTypes, Model, type InferAttributes, type InferCreationAttributes } from 'sequelize';
import { sequelize } from './sequelize';

/** A job given to a person: an apprentice draws only in these. */
export class JobPerson extends Model<InferAttributes<JobPerson>, InferCreationAttributes<JobPerson>> {
  declare teamId: string;
  declare jobId: string;
  declare personId: string;
}
JobPerson.init(
  {
    teamId: { type: DataTypes.UUID, primaryKey: true },
    jobId: { type: DataTypes.UUID, primaryKey: true },
    personId: { type: DataTypes.UUID, primaryKey: true },
  },
  { sequelize, modelName: 'JobPerson', tableName: 'job_people' },
);
