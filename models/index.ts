import type { Model, ModelStatic } from 'sequelize';
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
import { Upload } from './upload';

/**
 * All associations. A key of two columns is more than an association can say: it joins by the id alone (a random uuid),
 * and each query names the team besides. The database holds the foreign keys.
 */
function join(
  from: ModelStatic<Model>,
  how: 'hasOne' | 'hasMany' | 'belongsTo',
  to: ModelStatic<Model>,
  as: string,
  foreignKey: string,
): void {
  // A development reload runs this file again over models that are joined already.
  if (from.associations[as]) return;
  const key = how === 'belongsTo' ? { targetKey: 'id' } : { sourceKey: 'id' };
  from[how](to, { as, foreignKey, ...key, constraints: false });
}
join(Person, 'hasOne', Login, 'login', 'personId');
join(Person, 'hasMany', Membership, 'memberships', 'personId');
join(Job, 'belongsTo', Client, 'client', 'clientId');
join(Job, 'hasOne', Drawing, 'drawing', 'jobId');
join(DrawingChange, 'belongsTo', Person, 'person', 'personId');
join(Revision, 'belongsTo', Person, 'person', 'personId');
join(Upload, 'belongsTo', Person, 'person', 'personId');

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
  Upload,
  sequelize,
};
