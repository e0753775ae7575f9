import { randomUUID } from 'node:crypto';
import { PICTURE } from './a-picture';
import { jobInput, place } from './factories';
import type { World } from './world';

/** Who asks: everybody of the team, somebody of another team who holds all roles there, and nobody. */
export const ASKING = ['electrician', 'apprentice', 'idle', 'trainer', 'admin', 'stranger', 'anonymous'] as const;
export type Asking = (typeof ASKING)[number];

export interface Row {
  params?: (world: World) => Record<string, string>;
  body?: (world: World) => unknown;
  path?: string;
  /** sent as it is, instead of a body, with its type */
  file?: { bytes: Buffer<ArrayBuffer>; type: string };
  /** the status that each of them gets, in the order of `ASKING` */
  gets: readonly [number, number, number, number, number, number, number];
  /** needs no sign-in: why */
  open?: string;
}

const ofJob = ({ jobId }: World) => ({ jobId });
const ofDrawing = ({ drawingId }: World) => ({ drawingId });
const ofUpload = ({ uploadId }: World) => ({ uploadId });
const ofPerson = ({ people }: World) => ({ personId: people.target.id });
const READ_DRAWING = [200, 200, 404, 200, 200, 404, 401] as const;

/**
 * The written matrix of trust: every method of every route, with what each kind of person gets. A route without a row
 * fails the test that reads this table.
 */
export const ACCESS: Record<string, Row> = {
  'GET /api/jobs': { gets: [200, 200, 200, 200, 200, 200, 401] },
  'POST /api/jobs': { body: () => jobInput(), gets: [201, 403, 403, 403, 403, 201, 401] },
  'GET /api/jobs/[jobId]': { params: ofJob, gets: READ_DRAWING },
  'PATCH /api/jobs/[jobId]': {
    params: ofJob,
    body: () => ({ version: 0, title: 'Heron Row 11' }),
    gets: [200, 403, 404, 403, 403, 404, 401],
  },
  'GET /api/jobs/[jobId]/uploads': { params: ofJob, gets: READ_DRAWING },
  'POST /api/jobs/[jobId]/uploads': {
    params: ofJob,
    path: `/?id=${randomUUID()}&subject=board`,
    file: { bytes: PICTURE, type: 'image/png' },
    gets: [201, 201, 404, 403, 403, 404, 401],
  },
  'GET /api/uploads/[uploadId]': { params: ofUpload, gets: READ_DRAWING },
  'PATCH /api/uploads/[uploadId]': {
    params: ofUpload,
    body: () => ({ caption: 'The board, open' }),
    gets: [200, 200, 404, 403, 403, 404, 401],
  },
  'GET /api/clients': { gets: [200, 403, 403, 403, 200, 200, 401] },
  'GET /api/people': { gets: [200, 403, 403, 200, 200, 200, 401] },
  'POST /api/people': {
    body: () => ({ name: 'Rae Holt', email: `${randomUUID()}@example.org`, roles: ['apprentice'] }),
    gets: [403, 403, 403, 403, 201, 201, 401],
  },
  'PATCH /api/people/[personId]': {
    params: ofPerson,
    body: () => ({ active: false }),
    gets: [403, 403, 403, 403, 200, 404, 401],
  },
  'POST /api/people/[personId]/link': { params: ofPerson, gets: [403, 403, 403, 403, 201, 404, 401] },
  'POST /api/account/password': {
    body: () => ({ current: 'not the right one', next: 'a kettle and four cups' }),
    gets: [400, 400, 400, 400, 400, 400, 401],
  },
  'POST /api/account/sign-out-everywhere': { gets: [200, 200, 200, 200, 200, 200, 401] },
  'POST /api/invitations/accept': {
    body: () => ({ token: 'x'.repeat(64), password: 'a kettle and four cups' }),
    gets: [404, 404, 404, 404, 404, 404, 404],
    open: 'the token proves the right',
  },
  'GET /api/drawings/[drawingId]': { params: ofDrawing, gets: READ_DRAWING },
  'GET /api/drawings/[drawingId]/changes': { params: ofDrawing, gets: READ_DRAWING },
  'POST /api/drawings/[drawingId]/changes': {
    params: ofDrawing,
    body: () => ({ saveId: randomUUID(), base: 0, label: 'Add a place', patch: place('p1') }),
    gets: [200, 200, 404, 403, 403, 404, 401],
  },
  'GET /api/drawings/[drawingId]/revisions': { params: ofDrawing, gets: READ_DRAWING },
  'POST /api/drawings/[drawingId]/revisions': {
    params: ofDrawing,
    body: () => ({ note: 'First draft' }),
    gets: [201, 201, 404, 403, 403, 404, 401],
  },
  'GET /api/drawings/[drawingId]/events': { params: ofDrawing, gets: READ_DRAWING },
  'GET /api/drawings/[drawingId]/csv': { params: ofDrawing, gets: READ_DRAWING },
  'GET /api/drawings/[drawingId]/json': { params: ofDrawing, gets: READ_DRAWING },
  'GET /api/drawings/[drawingId]/pdf': { params: ofDrawing, gets: READ_DRAWING },
  'GET /api/drawings/[drawingId]/svg': { params: ofDrawing, gets: READ_DRAWING },
  'GET /api/health': { gets: [200, 200, 200, 200, 200, 200, 200], open: 'says only whether the server answers' },
};

/** Routes of the sign-in itself, which has tests of its own. */
export const NOT_OURS = ['/api/auth/[...nextauth]'];
