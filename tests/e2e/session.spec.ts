import { expect, test } from 'playwright/test';
import { signInAs } from './sign-in';

test('a copied cookie is dead after signing out, and the cookie cannot be read by scripts', async ({
  page,
  playwright,
  baseURL,
}) => {
  await signInAs(page, 'electrician');
  const cookies = await page.context().cookies();
  const session = cookies.find(({ name }) => name === 'session.ohmstead')!;
  expect(session).toMatchObject({ httpOnly: true, sameSite: 'Lax', path: '/' });

  const thief = await playwright.request.newContext({
    baseURL,
    extraHTTPHeaders: { cookie: `${session.name}=${session.value}` },
  });
  expect((await thief.get('/api/jobs')).status()).toBe(200);
  const { csrfToken } = (await (await page.request.get('/api/auth/csrf')).json()) as { csrfToken: string };
  await page.request.post('/api/auth/signout', { form: { csrfToken, json: 'true' }, headers: { origin: baseURL! } });
  expect((await thief.get('/api/jobs')).status()).toBe(401);
  expect(await (await thief.get('/api/auth/session')).json()).not.toHaveProperty('user.name');
  // The frame of the page may be on its way before the session is read: then the redirect stands in the body.
  const shown = await thief.get('/jobs', { maxRedirects: 0 });
  const text = await shown.text();
  expect(shown.status() === 307 || text.includes('/signin')).toBe(true);
  expect(text).not.toContain('Quarry Steps');
  await thief.dispose();
});

test('signing in from another site, or with a forged host, gets nowhere', async ({ request, baseURL }) => {
  const { csrfToken } = (await (await request.get('/api/auth/csrf')).json()) as { csrfToken: string };
  const form = { csrfToken, email: 'tessa@tillmere.example', password: 'lamp post by the weir', json: 'true' };
  for (const origin of ['https://elsewhere.example', 'null', undefined]) {
    const headers = origin ? { origin } : undefined;
    expect((await request.post('/api/auth/callback/credentials', { form, headers })).status()).toBe(403);
  }
  const forged = await request.get('/api/auth/signin', {
    headers: { 'x-forwarded-host': 'elsewhere.example', 'x-forwarded-proto': 'https' },
    maxRedirects: 0,
  });
  const leads = decodeURIComponent(forged.headers()['location'] ?? '');
  expect(leads).toContain(`callbackUrl=${baseURL}`);
  expect(leads).not.toContain('elsewhere.example');
});

test('a sixth guess within a minute is told to wait, whatever address the request claims to come from', async ({
  request,
  baseURL,
}) => {
  const { csrfToken } = (await (await request.get('/api/auth/csrf')).json()) as { csrfToken: string };
  const answers = [];
  for (let i = 0; i < 6; i++) {
    const answer = await request.post('/api/auth/callback/credentials', {
      form: { csrfToken, email: 'nobody@tillmere.example', password: `guess ${i}`, json: 'true' },
      headers: { origin: baseURL!, 'x-forwarded-for': `203.0.113.${i}`, 'x-real-ip': `203.0.113.${i}` },
    });
    answers.push(decodeURIComponent(((await answer.json()) as { url: string }).url));
  }
  for (const url of answers.slice(0, 5)) expect(url).toContain('error=CredentialsSignin');
  expect(answers[5]).toMatch(/error=wait:\d+/);
});
