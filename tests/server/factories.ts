import { randomUUID } from 'node:crypto';
import type { Supply } from '@/diagram/document/schema';
import { hashPassword } from '@/lib/server/account/password';
import { initialsOf, type Actor } from '@/lib/server/actor';
import { createJob } from '@/lib/server/jobs/create-job';
import type { JobInput, JobView } from '@/lib/shared/jobs';
import type { PersonRole } from '@/lib/shared/people';
import { storage } from '@/lib/server/storage/driver';
import { keyOf } from '@/lib/server/uploads/keys';
import { Login, Membership, Person, Team, Upload } from '@/models';
import { PICTURE } from './a-picture';

export const PASSWORD = 'the kettle is on the left';
let hashed: Promise<string> | undefined;

export const makeTeam = (name = 'Reedbank Electrics'): Promise<Team> => Team.create({ name });

/** A person with a password; of a new team where none is given. */
export async function makePerson(
  roles: PersonRole[] = ['electrician'],
  team?: Team,
  name = 'Tilda Brook',
): Promise<Person> {
  const { id: teamId } = team ?? (await makeTeam());
  const person = await Person.create({ teamId, name });
  hashed ??= hashPassword(PASSWORD);
  const email = `${person.id}@example.org`;
  await Login.create({ email, teamId, personId: person.id, passwordHash: await hashed, passwordAt: new Date() });
  await Membership.bulkCreate(roles.map((role) => ({ teamId, personId: person.id, role })));
  return person;
}

export const emailOf = (person: Person): string => `${person.id}@example.org`;

/** The person as the server functions take them. */
export async function actorFor(person: Person): Promise<Actor> {
  const held = await Membership.findAll({ where: { teamId: person.teamId, personId: person.id } });
  return {
    teamId: person.teamId,
    team: 'Reedbank Electrics',
    personId: person.id,
    sessionId: randomUUID(),
    name: person.name,
    initials: initialsOf(person.name),
    roles: held.map(({ role }) => role),
  };
}

export const SUPPLY: Supply = { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.35, zln: 0.25 };

export const jobInput = (over: Partial<JobInput> = {}): JobInput => ({
  title: 'Heron Row 9',
  client: 'O. Pell',
  address: 'Heron Row 9, Tillmere',
  practice: 'IEC',
  supply: SUPPLY,
  hoursWanted: 0,
  due: null,
  ...over,
});

/** A job of an electrician's team, with its empty drawing. */
export const makeJob = async (electrician: Person, over: Partial<JobInput> = {}): Promise<JobView> =>
  createJob(await actorFor(electrician), jobInput(over));

/** A picture that was stored, without the work of reading one. */
export async function makeUpload({ teamId, id: personId }: Person, jobId: string): Promise<Upload> {
  const id = randomUUID();
  for (const size of ['large', 'small'] as const)
    await storage().put(keyOf({ teamId, jobId, id }, size), PICTURE, 'image/webp');
  const shown = { subject: 'board' as const, place: null, caption: 'The board', width: 2, height: 2 };
  return Upload.create({
    ...shown,
    ...{ teamId, id, jobId, personId, bytes: PICTURE.length, sha256: '0'.repeat(64), storedAt: new Date() },
  });
}

/** A place, as the smallest change that a drawing can take. */
export const place = (id: string, name = id) => ({ set: { places: [{ id, name, kind: 'room' as const }] } });

export const change = (base: number, patch: object, saveId: string = randomUUID(), label = 'Add a place') => ({
  saveId,
  base,
  label,
  patch,
});
