import { randomUUID } from 'node:crypto';
import os from 'node:os';
import { QueryTypes } from 'sequelize';
import { diff } from '@/diagram/document/patch';
import type { PlanPosition } from '@/diagram/document/schema';
import { demoHomes } from '@/lib/server/demo/homes';
import { stopBackground } from '@/lib/server/drawings/background';
import { saveChange } from '@/lib/server/drawings/save-change';
import { createJob } from '@/lib/server/jobs/create-job';
import { openDrawing } from '@/lib/server/drawings/open-drawing';
import { Membership, Person, Team, sequelize } from '@/models';

/** Run by bench-saves.mjs: 40 drawings of whole homes, each in one hand, a part moved with every save. */
const perSecond = Number(process.argv[2] ?? 100);
const seconds = Number(process.argv[3] ?? 15);
const DRAWINGS = 40;

const team = await Team.create({ name: 'Bench' });
const person = await Person.create({ teamId: team.id, name: 'Bench Hand' });
await Membership.create({ teamId: team.id, personId: person.id, role: 'electrician' });
const hand = {
  ...{ teamId: team.id, team: team.name, personId: person.id, sessionId: randomUUID() },
  ...{ name: person.name, initials: 'B. H.', roles: ['electrician' as const] },
};
const { document } = demoHomes()[0]!;
const { title, practice, supply } = document;
const drawings: { id: string; rev: number; free: Promise<unknown> }[] = [];
for (let n = 0; n < DRAWINGS; n++) {
  const job = await createJob(hand, { title, client: 'C', address: '', practice, supply, hoursWanted: 0, due: null });
  const { document: empty } = await openDrawing(hand, { drawingId: job.drawingId });
  const save = { saveId: randomUUID(), base: 0, label: 'Draft the sheet', patch: diff(empty, document) };
  const { rev } = await saveChange(hand, job.drawingId, save);
  drawings.push({ id: job.drawingId, rev, free: Promise.resolve() });
}

const wal = async () =>
  (await sequelize.query<{ at: string }>('select pg_current_wal_lsn() - $1::pg_lsn as at', { bind: ['0/0'], type: QueryTypes.SELECT }))[0]!.at;

const times: number[] = [];
let failed = 0;
async function save(drawing: (typeof drawings)[number], n: number): Promise<void> {
  const part = document.parts[n % document.parts.length]!;
  const at: PlanPosition = { x: n % 10_000, y: 250, on: 'ground' };
  const began = performance.now();
  try {
    const change = { saveId: randomUUID(), base: drawing.rev, label: 'Move a part', patch: { set: { plan: { [part.id]: at } } } };
    drawing.rev = (await saveChange(hand, drawing.id, change)).rev;
    times.push(performance.now() - began);
  } catch {
    failed += 1; // counted and said below
  }
}

const before = Number(await wal());
const began = performance.now();
for (let n = 0; n < perSecond * seconds; n++) {
  const wait = began + (n * 1000) / perSecond - performance.now();
  if (wait > 0) await new Promise((resolve) => setTimeout(resolve, wait));
  const drawing = drawings[n % DRAWINGS]!;
  drawing.free = drawing.free.then(() => save(drawing, n));
}
await Promise.all(drawings.map(({ free }) => free));
const took = (performance.now() - began) / 1000;
times.sort((a, b) => a - b);
const at = (share: number) => Number(times[Math.min(times.length - 1, Math.floor(times.length * share))]!.toFixed(1));
console.log(
  JSON.stringify({
    name: 'save until its durable answer',
    asked: perSecond,
    reached: Number((times.length / took).toFixed(1)),
    saves: times.length,
    failed,
    p50: at(0.5),
    p95: at(0.95),
    p99: at(0.99),
    walPerSave: Math.round((Number(await wal()) - before) / times.length),
    load: os.loadavg()[0],
  }),
);
await stopBackground();
await sequelize.close();
