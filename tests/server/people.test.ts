import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { POST as accept } from '@/app/api/invitations/accept/route';
import { GET as list, POST as invite } from '@/app/api/people/route';
import { PATCH as change } from '@/app/api/people/[personId]/route';
import { POST as link } from '@/app/api/people/[personId]/link/route';
import { signIn } from '@/lib/server/account/sign-in';
import { readToken } from '@/lib/server/people/invitation-token';
import { createTeam } from '@/lib/server/people/create-team';
import { AuditEntry, Invitation, Login, Membership, sequelize } from '@/models';
import { Browser, signedIn } from './browser';
import { emailOf, makePerson, makeTeam } from './factories';
import { Jar, withJar } from './jar';

const NEXT = 'eleven quiet herons';
const tokenOf = (url: string) => new URL(url).hash.slice(1);

async function office() {
  const team = await makeTeam();
  const admin = await signedIn(await makePerson(['admin'], team, 'Ada Merrow'));
  const email = `${randomUUID()}@example.org`;
  const invited = await admin.post(invite, {}, { name: 'Rae Holt', email, roles: ['apprentice', 'electrician'] });
  return { team, admin, email, invited, token: tokenOf(invited.body.link), personId: invited.body.person.id as string };
}

describe('an invitation', () => {
  it('makes a person who waits, with a link that leads to the configured address whatever the request said of its host', async () => {
    const { team, admin } = await office();
    const { status, body } = await admin.ask(invite, {
      method: 'POST',
      body: { name: 'Ida Brook', email: `${randomUUID()}@example.org`, roles: ['trainer'] },
      headers: { host: 'elsewhere.example', 'x-forwarded-host': 'elsewhere.example', 'x-forwarded-proto': 'https' },
    });
    expect(status).toBe(201);
    expect(body.person).toMatchObject({
      name: 'Ida Brook',
      initials: 'I. B.',
      roles: ['trainer'],
      status: 'waiting',
      active: true,
      lastSeen: null,
    });
    const url = new URL(body.link);
    expect(url.origin + url.pathname).toBe('http://127.0.0.1:3000/invitation');
    expect(Buffer.from(tokenOf(body.link), 'base64url').length - 16).toBeGreaterThanOrEqual(16);
    expect(readToken(tokenOf(body.link))!.teamId).toBe(team.id);
  });

  it('keeps no token that could be used', async () => {
    const { team, token } = await office();
    const [row] = await Invitation.findAll({ where: { teamId: team.id } });
    expect(Object.values(row!.get()).map(String)).not.toContain(token);
  });

  it('is taken up once, and the person signs in with the password then', async () => {
    const { email, token, admin, personId } = await office();
    const answers = await Promise.all(
      Array.from({ length: 5 }, () => new Browser().post(accept, {}, { token, password: NEXT })),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 404, 404, 404, 404]);
    expect((await new Browser().post(accept, {}, { token, password: 'another good sentence' })).body).toMatchObject({
      error: 'missing',
    });
    expect(await withJar(new Jar(), () => signIn(email, NEXT, '10.2.0.1'))).toMatchObject({ who: { personId } });
    const row = (await admin.ask(list)).body.find((person: { id: string }) => person.id === personId);
    expect(row).toMatchObject({ status: 'active', roles: ['apprentice', 'electrician'] });
  });

  it('runs out', async () => {
    const { team, token } = await office();
    await sequelize.query(
      `update invitations set created_at = now() - interval '8 days', expires_at = now() - interval '1 day' where team_id = $1`,
      { bind: [team.id] },
    );
    expect((await new Browser().post(accept, {}, { token, password: NEXT })).status).toBe(404);
  });

  it('is replaced by a newer one, and of a person who was switched off it opens nothing', async () => {
    const { admin, token, personId } = await office();
    const renewed = tokenOf((await admin.post(link, { personId })).body.link);
    expect((await new Browser().post(accept, {}, { token, password: NEXT })).status).toBe(404);
    await admin.ask(change, { method: 'PATCH', params: { personId }, body: { active: false } });
    expect((await new Browser().post(accept, {}, { token: renewed, password: NEXT })).status).toBe(404);
    expect((await admin.post(link, { personId })).status).toBe(404);
  });

  it('opens nothing when a byte of it or its team is changed', async () => {
    const { token } = await office();
    const other = (await office()).token;
    for (const wrong of [`${token.slice(0, -2)}AA`, other.slice(0, 22) + token.slice(22), token.slice(1), `${token}A`])
      expect([400, 404]).toContain((await new Browser().post(accept, {}, { token: wrong, password: NEXT })).status);
  });

  it('refuses an address that is taken, here or in another team, in the same words', async () => {
    const { admin, email } = await office();
    const elsewhere = emailOf(await makePerson());
    const ask = (address: string) => admin.post(invite, {}, { name: 'Rae', email: address, roles: ['apprentice'] });
    const [own, foreign] = [await ask(email), await ask(elsewhere.toUpperCase())];
    expect(own).toMatchObject({ status: 400, body: { fields: { email: expect.any(String) } } });
    expect(foreign.body).toEqual(own.body);
  });

  it('refuses a password that is guessed early before the link is used up', async () => {
    const { token } = await office();
    expect((await new Browser().post(accept, {}, { token, password: 'password1234' })).body).toMatchObject({
      fields: { password: expect.any(String) },
    });
    expect((await new Browser().post(accept, {}, { token, password: NEXT })).status).toBe(200);
  });
});

describe('people', () => {
  it('take no other field than those named', async () => {
    const { admin, team, personId } = await office();
    const other = await makeTeam();
    const extra = {
      teamId: other.id,
      id: randomUUID(),
      createdAt: '2020-01-01',
      passwordHash: 'x',
      email: 'x@example.org',
      memberships: [],
    };
    for (const [field, value] of Object.entries(extra)) {
      const answer = await admin.ask(change, {
        method: 'PATCH',
        params: { personId },
        body: { active: true, [field]: value },
      });
      expect([field, answer.status]).toEqual([field, 400]);
    }
    expect(await Membership.count({ where: { teamId: team.id, personId } })).toBe(2);
  });

  it('are listed by name, without anything secret', async () => {
    const { admin } = await office();
    const { body } = await admin.ask(list);
    expect(body.map(({ name }: { name: string }) => name)).toEqual(['Ada Merrow', 'Rae Holt']);
    expect(JSON.stringify(body)).not.toMatch(/argon2|hash|token/i);
  });

  it('and what is done to them is written down, and cannot be rewritten', async () => {
    const { team, admin, personId } = await office();
    await admin.ask(change, { method: 'PATCH', params: { personId }, body: { roles: ['trainer'] } });
    const entries = await AuditEntry.findAll({
      where: { teamId: team.id, subjectId: personId },
      order: [['id', 'ASC']],
    });
    expect(entries.map(({ action, detail }) => [action, detail])).toEqual([
      ['people.invite', { roles: ['apprentice', 'electrician'] }],
      ['people.change', { roles: ['trainer'] }],
    ]);
    const where = { teamId: team.id };
    await expect(AuditEntry.update({ action: 'people.nothing' }, { where })).rejects.toThrow(/never changed/);
    await expect(AuditEntry.destroy({ where })).rejects.toThrow(/never changed/);
    await expect(sequelize.query('truncate audit_entries')).rejects.toThrow();
  });

  it('of a new team begin with its admin, who sets a password by the link', async () => {
    const email = `${randomUUID()}@example.org`;
    const { link: url } = await createTeam('Weir Wiring', { name: 'Ola Weir', email });
    expect((await new Browser().post(accept, {}, { token: tokenOf(url), password: NEXT })).body).toEqual({ email });
    const login = (await Login.findOne({ where: { email } }))!;
    const roles = await Membership.findAll({ where: { teamId: login.teamId }, order: [['role', 'ASC']] });
    expect(roles.map(({ role }) => role)).toEqual(['admin', 'electrician']);
  });
});
