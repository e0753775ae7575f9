import { AuditEntry } from './audit-entry';
import { AuthSession } from './auth-session';
import { Client } from './client';
import { Drawing } from './drawing';
import { DrawingChange } from './drawing-change';
import { DrawingSnapshot } from './drawing-snapshot';
import { Examination } from './examination';
import { Invitation } from './invitation';
import { Job } from './job';
import { JobPerson } from './job-person';
import { Login } from './login';
import { Membership } from './membership';
import { Person } from './person';
import { Presence } from './presence';
import { Revision } from './revision';
import { sequelize } from './sequelize';
import { Team } from './team';

/**
 * All associations. A key of two columns is more than an association can say: it joins by the id alone (a random uuid),
 * and each query names the team besides. The database holds the foreign keys.
 */
const none = { constraints: false } as const;
Person.hasOne(Login, { as: 'login', foreignKey: 'personId', sourceKey: 'id', ...none });
Person.hasMany(Membership, { as: 'memberships', foreignKey: 'personId', sourceKey: 'id', ...none });
Job.belongsTo(Client, { as: 'client', foreignKey: 'clientId', targetKey: 'id', ...none });
Job.hasOne(Drawing, { as: 'drawing', foreignKey: 'jobId', sourceKey: 'id', ...none });
DrawingChange.belongsTo(Person, { as: 'person', foreignKey: 'personId', targetKey: 'id', ...none });
Revision.belongsTo(Person, { as: 'person', foreignKey: 'personId', targetKey: 'id', ...none });

export {
  AuditEntry,
  AuthSession,
  Client,
  Drawing,
  DrawingChange,
  DrawingSnapshot,
  Examination,
  Invitation,
  Job,
  JobPerson,
  Login,
  Membership,
  Person,
  Presence,
  Revision,
  Team,
  sequelize,
};
