import { callApi, type Answer } from '@/lib/shared/api-client';
import { csvText } from '@/lib/shared/csv';
import type { JobPage, JobQuery, JobRow } from '@/lib/shared/jobs';
import { queryString } from './query-string';

const HEAD = ['Number', 'Place', 'Client', 'Drawn', 'Checked', 'Revision', 'State', 'What waits', 'Due', 'Danger', 'Defect', 'Advice'];

const line = (job: JobRow) => [
  job.number,
  job.title,
  job.client,
  job.drawnBy,
  job.checkedBy,
  job.revision,
  job.state,
  job.waits,
  job.due,
  job.findings?.danger ?? null,
  job.findings?.defect ?? null,
  job.findings?.advice ?? null,
];

/** Every row that the query finds, all pages of it, as CSV. */
export async function registerCsv(query: JobQuery): Promise<Answer<string>> {
  const rows: JobRow[] = [];
  for (let page = 1, pages = 1; page <= pages; page += 1) {
    const answer = await callApi<JobPage>('GET', `/api/jobs?${queryString({ ...query, page })}`);
    if (!answer.ok) return answer;
    rows.push(...answer.data.rows);
    pages = answer.data.pages;
  }
  return { ok: true, data: csvText([HEAD, ...rows.map(line)]) };
}
