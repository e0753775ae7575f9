import { describe, expect, it } from 'vitest';
import { encode } from 'next-auth/jwt';
import { GET as jobs } from '@/app/api/jobs/route';
import { PATCH as changePerson } from '@/app/api/people/[personId]/route';
import { POST as link } from '@/app/api/people/[personId]/link/route';
import { POST as accept } from '@/app/api/invitations/accept/route';
import { POST as password } from '@/app/api/account/password/route';
import { POST as everywhere } from '@/app/api/account/sign-out-everywhere/route';
import { endSession } from '@/lib/server/account/end-sessions';
import { signIn, beginSession } from '@/lib/server/account/sign-in';
import { authOptions } from '@/lib/server/auth';
import { sessionCookie } from '@/lib/server/session';
import { AuthSession, Invitation, Membership, Person, sequelize } from '@/models';
import { Browser, signedIn } from './browser';
import { Jar, withJar } from './jar';
import { PASSWORD, emailOf, makePerson, makeTeam } from './factories';

const seesJobs = async (browser: Browser) => (await browser.ask(jobs)).status;
/** The cookies of a browser, as somebody copied them before. */
const copyOf = (browser: Browser) => new Browser(browser.jar.copy());

describe('a copied session cookie is dead at once', () => {
  it('after signing out', async () => {
    const person = await makePerson();
    const token = await beginSession({ teamId: person.teamId, personId: person.id });
    const jar = new Jar();
    jar.set(sessionCookie(), await encode({ token: { ...token }, secret: process.env.NEXTAUTH_SECRET!, maxAge: 60 }));
    const copy = copyOf(new Browser(jar));
    expect(await seesJobs(copy)).toBe(200);
    await endSession(token);
    expect(await seesJobs(copy)).toBe(401);
  });

  it('after signing out everywhere, on every browser', async () => {
    const person = await makePerson();
    const [one, other] = [await signedIn(person), await signedIn(person)];
    const copy = copyOf(other);
    await one.post(everywhere, {});
    expect(await Promise.all([one, other, copy].map(seesJobs))).toEqual([401, 401, 401]);
  });

  it('after a change of password, but for the browser on which it was changed', async () => {
    const person = await makePerson();
    const [one, other] = [await signedIn(person), await signedIn(person)];
    expect((await one.post(password, {}, { current: PASSWORD, next: 'eleven quiet herons' })).status).toBe(200);
    expect(await Promise.all([one, other].map(seesJobs))).toEqual([200, 401]);
    expect(await withJar(new Jar(), () => signIn(emailOf(person), PASSWORD, '10.0.0.1'))).toBeNull();
    expect(await withJar(new Jar(), () => signIn(emailOf(person), 'eleven quiet herons', '10.0.0.1'))).toMatchObject({
      who: { personId: person.id },
    });
  });

  it('after an admin switches the person off; nobody signs in then', async () => {
    const team = await makeTeam();
    const [admin, person] = [await makePerson(['admin'], team), await makePerson(['electrician'], team)];
    const copy = copyOf(await signedIn(person));
    const answer = await (
      await signedIn(admin)
    ).ask(changePerson, { method: 'PATCH', params: { personId: person.id }, body: { active: false } });
    expect(answer.body).toMatchObject({ status: 'off', active: false });
    expect(await seesJobs(copy)).toBe(401);
    expect(await withJar(new Jar(), () => signIn(emailOf(person), PASSWORD, '10.0.0.2'))).toBeNull();
  });

  it('after the person set a new password by a one-time link', async () => {
    const team = await makeTeam();
    const [admin, person] = [await makePerson(['admin'], team), await makePerson(['electrician'], team)];
    const copy = copyOf(await signedIn(person));
    const given = await (await signedIn(admin)).post(link, { personId: person.id });
    const token = new URL(given.body.link).hash.slice(1);
    expect((await new Browser().post(accept, {}, { token, password: 'eleven quiet herons' })).body).toEqual({
      email: emailOf(person),
    });
    expect(await seesJobs(copy)).toBe(401);
  });

  it('after twelve hours whatever happens, and after four without a request', async () => {
    const person = await makePerson();
    for (const age of [
      `created_at = now() - interval '13 hours', expires_at = now() - interval '1 hour'`,
      `seen_at = now() - interval '4 hours 1 minute'`,
    ]) {
      const browser = await signedIn(person);
      expect(await seesJobs(browser)).toBe(200);
      await sequelize.query(`update auth_sessions set ${age} where team_id = $1 and ended_at is null`, {
        bind: [person.teamId],
      });
      expect(await seesJobs(browser)).toBe(401);
    }
  });
});

describe('rights', () => {
  it('bite at the next request when a role is taken away', async () => {
    const team = await makeTeam();
    const [admin, person] = [await makePerson(['admin'], team), await makePerson(['admin', 'electrician'], team)];
    const browser = await signedIn(person);
    const asks = () =>
      browser.ask(changePerson, { method: 'PATCH', params: { personId: admin.id }, body: { roles: ['admin'] } });
    expect((await asks()).status).toBe(200);
    await Membership.destroy({ where: { teamId: team.id, personId: person.id, role: 'admin' } });
    expect((await asks()).status).toBe(403);
  });

  it('stay with one admin at least, also when two switch each other off at once', async () => {
    const team = await makeTeam();
    const admins = [await makePerson(['admin'], team), await makePerson(['admin'], team)];
    const browsers = await Promise.all(admins.map(signedIn));
    const answers = await Promise.all(
      browsers.map((browser, i) =>
        browser.ask(changePerson, {
          method: 'PATCH',
          params: { personId: admins[1 - i]!.id },
          body: { active: false },
        }),
      ),
    );
    expect(answers.map(({ status }) => status).sort()).not.toEqual([200, 200]);
    expect(await Person.count({ where: { teamId: team.id, active: true } })).toBe(1);
  });
});

describe('a cookie', () => {
  const forged: Record<string, () => Promise<string>> = {
    'sealed with another secret': () =>
      encode({
        token: { sub: crypto.randomUUID(), tid: crypto.randomUUID(), sid: crypto.randomUUID() },
        secret: 'x'.repeat(40),
      }),
    'that is no token': async () => 'not.a.token',
    'that names nothing': () => encode({ token: { sub: 'me' }, secret: process.env.NEXTAUTH_SECRET! }),
    'that is an unsigned token': async () => `${btoa('{"alg":"none"}')}.${btoa('{"sub":"x"}')}.`,
  };
  it.each(Object.keys(forged))('%s is nobody', async (what) => {
    const jar = new Jar();
    jar.set(sessionCookie(), await forged[what]!());
    expect(await seesJobs(new Browser(jar))).toBe(401);
  });

  it('names the session of its own person only', async () => {
    const team = await makeTeam();
    const [one, other] = [await makePerson(['electrician'], team), await makePerson(['admin'], team)];
    const token = await beginSession({ teamId: team.id, personId: one.id });
    const jar = new Jar();
    jar.set(
      sessionCookie(),
      await encode({ token: { ...token, sub: other.id }, secret: process.env.NEXTAUTH_SECRET! }),
    );
    expect(await seesJobs(new Browser(jar))).toBe(401);
  });

  it('cannot be made from what rests in the database', async () => {
    const person = await makePerson();
    const session = await AuthSession.findOne({ where: { teamId: person.teamId } });
    await signedIn(person);
    const rows = await AuthSession.findAll({ where: { teamId: person.teamId } });
    const invitations = await Invitation.findAll();
    const values = [...rows, ...invitations, session].flatMap((row) => Object.values(row?.get() ?? {})).map(String);
    for (const value of values) {
      const jar = new Jar();
      jar.set(sessionCookie(), value);
      expect(await seesJobs(new Browser(jar))).toBe(401);
      if (value.length >= 20 && value.length <= 100)
        expect((await new Browser().post(accept, {}, { token: value, password: 'eleven quiet herons' })).status).toBe(
          404,
        );
    }
  });
});

describe('the redirect after signing in', () => {
  const redirect = authOptions().callbacks!.redirect!;
  const base = 'http://127.0.0.1:3000';
  it.each([
    ['/jobs?sort=title', `${base}/jobs?sort=title`],
    [`${base}/jobs`, `${base}/jobs`],
    ['https://elsewhere.example/jobs', base],
    ['//elsewhere.example', base],
    ['/\\elsewhere.example', base],
    ['javascript:alert(1)', base],
    [`${base}@elsewhere.example`, base],
    ['http://127.0.0.1:30001/', base],
  ])('of %s leads to %s', async (url, leads) => {
    expect(await redirect({ url, baseUrl: base })).toBe(leads);
  });
});

describe('single sign-on', () => {
  const check = authOptions().callbacks!.signIn!;
  const ask = (profile: object) =>
    check({
      account: { provider: 'oidc', type: 'oauth', providerAccountId: 'x' },
      profile,
      user: { id: 'x' },
    } as never);

  it('lets in people who were invited, by a confirmed address only', async () => {
    const person = await makePerson();
    const email = emailOf(person);
    expect(await ask({ sub: '1', email, email_verified: true })).toBe(true);
    expect(await ask({ sub: '1', email: email.toUpperCase(), email_verified: true })).toBe(true);
    for (const profile of [
      { email },
      { email, email_verified: false },
      { email, email_verified: 'true' },
      { email: 'nobody@example.org', email_verified: true },
      {},
    ])
      expect(await ask({ sub: '1', ...profile })).toBe('/signin?error=NotInvited');
  });

  it('takes no look-alike of an address for the address', async () => {
    const person = await makePerson();
    for (const email of [
      emailOf(person).replace('@', '\uFF20'),
      emailOf(person).replace('example', 'ex\u0430mple'),
      `${emailOf(person)}, x@example.org`,
    ])
      expect(await ask({ sub: '1', email, email_verified: true })).toBe('/signin?error=NotInvited');
  });

  it('lets nobody in who was switched off', async () => {
    const person = await makePerson();
    await person.update({ active: false });
    expect(await ask({ sub: '1', email: emailOf(person), email_verified: true })).toBe('/signin?error=NotInvited');
  });
});
