import 'server-only';
import { randomUUID } from 'node:crypto';
import { diff } from '@/diagram/document/patch';
import { emptyDocument } from '@/diagram/document/schema';
import { hashPassword } from '@/lib/server/account/password';
import { initialsOf, type Actor } from '@/lib/server/actor';
import accounts from '@/lib/server/demo/accounts.json';
import { demoHomes } from '@/lib/server/demo/homes';
import { examineDrawing } from '@/lib/server/drawings/background';
import { saveChange } from '@/lib/server/drawings/save-change';
import { createJob } from '@/lib/server/jobs/create-job';
import type { PersonRole } from '@/lib/shared/people';
import { Login, Membership, Person, Team } from '@/models';

const DAY_MS = 86_400_000;
const inDays = (days: number) => new Date(Date.now() + days * DAY_MS).toISOString().slice(0, 10);

async function makePerson(
  team: Team,
  { name, email, roles }: { name: string; email: string; roles: string[] },
): Promise<Actor> {
  const person = await Person.create({ teamId: team.id, name });
  const held = roles as PersonRole[];
  await Login.create({
    email,
    teamId: team.id,
    personId: person.id,
    passwordHash: await hashPassword(accounts.password),
    passwordAt: new Date(),
  });
  await Membership.bulkCreate(held.map((role) => ({ teamId: team.id, personId: person.id, role })));
  return {
    teamId: team.id,
    team: team.name,
    personId: person.id,
    sessionId: '',
    name,
    initials: initialsOf(name),
    roles: held,
  };
}

/** The demo: one team, four people (one a role), and its jobs. Does nothing where there is a team already. */
export async function seed(): Promise<void> {
  if ((await Team.count()) > 0) return;
  const team = await Team.create({ name: accounts.team, nextJob: 207 });
  const people = [];
  for (const account of accounts.people) people.push(await makePerson(team, account));
  const electrician = people.find(({ roles }) => roles.includes('electrician'))!;
  const apprentice = people.find(({ roles }) => roles.includes('apprentice'))!;
  for (const { document, client, address, hoursWanted, dueInDays, byApprentice } of demoHomes()) {
    const { title, practice, supply } = document;
    const due = dueInDays === null ? null : inDays(dueInDays);
    const given = byApprentice ? [apprentice.personId] : [];
    const job = await createJob(electrician, { title, client, address, practice, supply, hoursWanted, due, given });
    // As a person does it: one change that draws the home from its survey, in the hand of whoever drew it.
    const patch = diff(emptyDocument(title, practice, supply), document);
    const hand = byApprentice ? apprentice : electrician;
    await saveChange(hand, job.drawingId, { saveId: randomUUID(), base: 0, label: 'Draft the sheet', patch });
    await examineDrawing(team.id, job.drawingId);
  }
}
