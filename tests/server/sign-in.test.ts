import { describe, expect, it } from 'vitest';
import { POST as password } from '@/app/api/account/password/route';
import { signIn } from '@/lib/server/account/sign-in';
import { AuditEntry } from '@/models';
import { signedIn } from './browser';
import { PASSWORD, emailOf, makePerson } from './factories';
import { Jar, withJar } from './jar';

const attempt = (email: string, typed: string, address: string, jar = new Jar()) =>
  withJar(jar, () => signIn(email, typed, address));
let network = 0;
/** An address that no other test has used. */
const newAddress = () => `10.1.${Math.floor(++network / 250)}.${network % 250}`;

describe('signing in', () => {
  it('takes the right password, whatever the capitals of the address', async () => {
    const person = await makePerson();
    expect(await attempt(` ${emailOf(person).toUpperCase()} `, PASSWORD, newAddress())).toEqual({
      who: { teamId: person.teamId, personId: person.id },
    });
  });

  it('compares the password exactly and whole', async () => {
    const person = await makePerson();
    for (const typed of [PASSWORD.toUpperCase(), `${PASSWORD} `, PASSWORD.slice(0, -1), '', 'x'.repeat(50_000)])
      expect(await attempt(emailOf(person), typed, newAddress())).toBeNull();
  });

  it('writes a refusal down, without the password', async () => {
    const person = await makePerson();
    await attempt(emailOf(person), 'wrong but telling', newAddress());
    const find = () => AuditEntry.findOne({ where: { teamId: person.teamId, action: 'account.refused' } });
    await expect.poll(find).not.toBeNull();
    expect(await find()).toMatchObject({ personId: null, subjectId: person.id, detail: {} });
  });

  it('gives unknown addresses the same answer for the same work', async () => {
    const spent = { known: [] as number[], unknown: [] as number[] };
    for (let i = 0; i < 30; i++) {
      const email = { known: emailOf(await makePerson()), unknown: `nobody-${i}-${Date.now()}@example.org` };
      for (const kind of i % 2 ? (['known', 'unknown'] as const) : (['unknown', 'known'] as const)) {
        // Processor time, all threads: what else the machine does at the moment does not enter.
        const before = process.cpuUsage();
        expect(await attempt(email[kind], 'not the password', newAddress())).toBeNull();
        const { user, system } = process.cpuUsage(before);
        spent[kind].push(user + system);
      }
    }
    const median = (list: number[]) => [...list].sort((a, b) => a - b)[Math.floor(list.length / 2)]!;
    const ratio = median(spent.known) / median(spent.unknown);
    expect(ratio).toBeGreaterThan(0.8);
    expect(ratio).toBeLessThan(1.25);
  });
});

describe('guessing', () => {
  it('waits a minute after five tries from one address', async () => {
    const person = await makePerson();
    const address = newAddress();
    for (let i = 0; i < 5; i++) expect(await attempt(emailOf(person), `guess ${i}`, address)).toBeNull();
    for (const typed of ['guess 6', PASSWORD]) {
      const answer = await attempt(emailOf(person), typed, address);
      expect(answer).toEqual({ wait: expect.any(Number) });
      expect((answer as { wait: number }).wait).toBeLessThanOrEqual(60);
    }
  });

  it('says the same to whoever guesses at an address that is not known here', async () => {
    const address = newAddress();
    for (let i = 0; i < 5; i++) expect(await attempt('nobody-at-all@example.org', `guess ${i}`, address)).toBeNull();
    expect(await attempt('nobody-at-all@example.org', 'guess 6', address)).toEqual({ wait: expect.any(Number) });
  });

  it('lets at most twenty of a thousand guesses from fifty addresses reach the password, and the owner still in', async () => {
    const person = await makePerson();
    const own = new Jar();
    expect(await attempt(emailOf(person), PASSWORD, newAddress(), own)).toMatchObject({ who: {} });
    const addresses = Array.from({ length: 50 }, newAddress);
    let reached = 0;
    for (let round = 0; round < 20; round++) {
      const answers = await Promise.all(
        addresses.map((address) => attempt(emailOf(person), `guess ${round}`, address)),
      );
      reached += answers.filter((answer) => answer === null).length;
    }
    expect(reached).toBeLessThanOrEqual(20);
    expect(await attempt(emailOf(person), PASSWORD, addresses[0]!, own)).toMatchObject({
      who: { personId: person.id },
    });
    // A mark of another person's browser is worth nothing here.
    const others = new Jar();
    const other = await makePerson();
    await attempt(emailOf(other), PASSWORD, newAddress(), others);
    expect(await attempt(emailOf(person), PASSWORD, newAddress(), others)).toEqual({ wait: expect.any(Number) });
  });

  it('does not count a class that signs in behind one router', async () => {
    const address = newAddress();
    for (let i = 0; i < 70; i++)
      expect(await attempt(emailOf(await makePerson()), PASSWORD, address)).toMatchObject({ who: {} });
  });

  it('at the old password of a borrowed browser is held back as well', async () => {
    const person = await makePerson();
    const browser = await signedIn(person);
    const tries = [];
    for (let i = 0; i < 7; i++)
      tries.push((await browser.post(password, {}, { current: `guess ${i}`, next: 'eleven quiet herons' })).status);
    expect(tries).toEqual([400, 400, 400, 400, 400, 429, 429]);
  });
});

describe('a new password', () => {
  it.each(['password123', 'Qwertyuiop!', 'aaaaaaaaaaaa', '1234567890', 'Tilda Brook', 'electrician2026', 'short one'])(
    'is not %s',
    async (next) => {
      const browser = await signedIn(await makePerson());
      const answer = await browser.post(password, {}, { current: PASSWORD, next });
      expect(answer).toMatchObject({ status: 400, body: { fields: { next: expect.any(String) } } });
    },
  );

  it('may be a long sentence in any script', async () => {
    const browser = await signedIn(await makePerson());
    const next = 'der Kessel steht links, чайник слева, '.repeat(4);
    expect((await browser.post(password, {}, { current: PASSWORD, next })).status).toBe(200);
  });
});
