import { QueryTypes } from 'sequelize';
import { sequelize, type Person, type Team } from '@/models';
import { signedIn, type Browser } from './browser';
import { makeJob, makePerson, makeTeam, makeUpload } from './factories';

/** Two teams: everybody of the first, and somebody of the second who holds every role there. */
export interface World {
  team: Team;
  people: Record<'electrician' | 'apprentice' | 'idle' | 'trainer' | 'admin' | 'target', Person>;
  browsers: Record<'electrician' | 'apprentice' | 'idle' | 'trainer' | 'admin' | 'stranger', Browser>;
  /** given to `apprentice`, and so seen by the trainer; `idle` is an apprentice without a job */
  jobId: string;
  drawingId: string;
  uploadId: string;
  /** of the other team */
  foreign: { jobId: string; drawingId: string; personId: string; uploadId: string };
}

export async function makeWorld(): Promise<World> {
  const team = await makeTeam();
  const people = {
    electrician: await makePerson(['electrician'], team, 'Tilda Brook'),
    apprentice: await makePerson(['apprentice'], team, 'Noah Sedge'),
    idle: await makePerson(['apprentice'], team, 'Ira Wold'),
    trainer: await makePerson(['trainer'], team, 'Jo Quill'),
    admin: await makePerson(['admin'], team, 'Ada Merrow'),
    target: await makePerson(['electrician'], team, 'Uma Reed'),
  };
  const stranger = await makePerson(['apprentice', 'electrician', 'trainer', 'admin'], undefined, 'Sven Outer');
  const job = await makeJob(people.electrician, { given: [people.apprentice.id] });
  const other = await makeJob(stranger);
  return {
    team,
    people,
    browsers: {
      electrician: await signedIn(people.electrician),
      apprentice: await signedIn(people.apprentice),
      idle: await signedIn(people.idle),
      trainer: await signedIn(people.trainer),
      admin: await signedIn(people.admin),
      stranger: await signedIn(stranger),
    },
    jobId: job.id,
    drawingId: job.drawingId,
    uploadId: (await makeUpload(people.electrician, job.id)).id,
    foreign: {
      jobId: other.id,
      drawingId: other.drawingId,
      personId: stranger.id,
      uploadId: (await makeUpload(stranger, other.id)).id,
    },
  };
}

const TABLES = [
  ...['teams', 'people', 'logins', 'memberships', 'invitations', 'clients', 'jobs', 'job_people'],
  ...['drawings', 'drawing_changes', 'drawing_snapshots', 'revisions', 'auth_sessions', 'uploads'],
];

/** A fingerprint of everything that a team has; reading leaves it as it is, and so does every refusal. */
export async function fingerprint(teamId: string): Promise<string> {
  const parts = TABLES.map((table) => {
    const key = table === 'teams' ? 'id' : 'team_id';
    const row = table === 'auth_sessions' ? `(x.id, x.ended_at)::text` : 'x::text';
    return `select '${table}' as name, md5(coalesce(string_agg(${row}, '\n' order by ${row}), '')) as sum from ${table} x where ${key} = $1`;
  });
  const rows = await sequelize.query<{ name: string; sum: string }>(parts.join(' union all '), {
    bind: [teamId],
    type: QueryTypes.SELECT,
  });
  return rows
    .map(({ name, sum }) => `${name} ${sum}`)
    .sort()
    .join('\n');
}
