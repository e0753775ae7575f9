import 'server-only';
import { initialsOf, type Actor } from '@/lib/server/actor';
import type { JobRow } from '@/lib/shared/jobs';

/** A job with what its row in the register shows, as one query reads it. */
export interface JobRecord {
  id: string;
  number: string;
  title: string;
  client: string;
  address: string;
  hoursWanted: number;
  due: string | null;
  archived: boolean;
  version: number;
  updatedAt: Date;
  drawingId: string;
  rev: number;
  drawnBy: string;
  letter: string | null;
  state: JobRow['state'] | null;
  examinedRev: number | null;
  danger: number;
  defect: number;
  advice: number;
}

export const JOB_SELECT = `
  select j.id, t.prefix || '-' || j.number as number, j.title, c.name as client, j.address,
         j.hours_wanted as "hoursWanted", j.due::text as due, j.archived_at is not null as archived, j.version,
         greatest(j.updated_at, last.at) as "updatedAt", d.id as "drawingId", d.rev, p.name as "drawnBy",
         r.letter, r.state, e.rev as "examinedRev", e.danger, e.defect, e.advice`;

export const JOB_FROM = `
    from jobs j
    join teams t on t.id = j.team_id
    join clients c on c.team_id = j.team_id and c.id = j.client_id
    join drawings d on d.team_id = j.team_id and d.job_id = j.id
    left join drawing_changes last on last.team_id = d.team_id and last.drawing_id = d.id and last.rev = d.rev
    join people p on p.team_id = j.team_id and p.id = coalesce(last.person_id, j.created_by)
    left join examinations e on e.team_id = d.team_id and e.drawing_id = d.id
    left join lateral (select letter, state from revisions
                        where team_id = d.team_id and drawing_id = d.id order by rev desc limit 1) r on true`;

const GIVEN = `exists (select from job_people g where g.team_id = j.team_id and g.job_id = j.id and g.person_id = $2)`;
const TAUGHT = `exists (select from job_people g
                          join memberships m on m.team_id = g.team_id and m.person_id = g.person_id and m.role = 'apprentice'
                         where g.team_id = j.team_id and g.job_id = j.id)`;

/** The row 'job.read' of the matrix in `policies.ts` as a condition of a query over `jobs j`; $2 is the actor's id. */
export function visibleTo({ roles }: Actor): string {
  if (roles.includes('electrician') || roles.includes('admin')) return 'true';
  const some = [roles.includes('apprentice') && GIVEN, roles.includes('trainer') && TAUGHT].filter(Boolean);
  return some.length > 0 ? `(${some.join(' or ')})` : 'false';
}

const findingsOf = ({ examinedRev, danger, defect, advice }: JobRecord): JobRow['findings'] =>
  examinedRev === null ? null : { danger, defect, advice };

/** What the job waits for, in words. */
function waitsFor(record: JobRecord): string {
  if (record.archived) return 'nothing, archived';
  if (record.rev === 0) return 'the survey';
  const wrong = record.examinedRev === null ? 0 : record.danger + record.defect;
  if (wrong > 0) return `${wrong} ${wrong === 1 ? 'finding' : 'findings'} to put right`;
  return record.letter === null ? 'a first revision' : 'nothing';
}

/** The same as a condition of a query over `JOB_FROM`: a job of which it is false has "nothing" in that column. */
export const SOMETHING_WAITS = `(d.rev = 0 or r.letter is null or coalesce(e.danger + e.defect, 0) > 0)`;

export const presentRow = (record: JobRecord): JobRow => ({
  id: record.id,
  number: record.number,
  title: record.title,
  client: record.client,
  drawnBy: initialsOf(record.drawnBy),
  checkedBy: null,
  revision: record.letter ?? '-',
  state: record.state ?? 'draft',
  waits: waitsFor(record),
  due: record.due,
  findings: findingsOf(record),
  drawingId: record.drawingId,
  archived: record.archived,
  updatedAt: record.updatedAt.toISOString(),
});
