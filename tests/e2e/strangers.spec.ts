import { expect, test } from 'playwright/test';
import accounts from '../../lib/server/demo/accounts.json' with { type: 'json' };
import { signInAs } from './sign-in';

test('a stranger is sent to the sign-in sheet and comes back to the page asked for', async ({ page }) => {
  await page.goto('/jobs?sort=title');
  await expect(page).toHaveURL(/\/signin\?next=/);
  await page.getByLabel('E-mail').fill(accounts.people[0]!.email);
  await page.getByLabel('Password', { exact: true }).fill(accounts.password);
  await page.getByRole('button', { name: 'Open my sheets' }).click();
  await expect(page).toHaveURL(/\/jobs\?sort=title/);
});

test('every page of the set carries its headers and runs no script without the nonce', async ({ page }) => {
  const complaints: string[] = [];
  page.on('console', (message) => {
    if (/Content Security Policy/i.test(message.text())) complaints.push(message.text());
  });
  await signInAs(page, 'electrician');
  for (const path of ['/signin', '/jobs', '/people', '/account', '/rules']) {
    const answer = (await page.goto(path))!;
    const headers = answer.headers();
    expect(headers['content-security-policy'], path).toMatch(/script-src 'self' 'nonce-[^']+' 'strict-dynamic'/);
    expect(headers['x-content-type-options'], path).toBe('nosniff');
    expect(headers['x-powered-by'], path).toBeUndefined();
    await page.waitForLoadState('load');
    // Scripts that ran have taken the page over: the framework marks the document.
    await page.waitForFunction(() => 'next' in window);
  }
  expect(complaints).toEqual([]);
});

test('no page shows anything to a cookie that is nobody\u2019s: each reads the session itself', async ({
  browser,
  page,
  baseURL,
}) => {
  await signInAs(page, 'electrician');
  const { rows } = (await (await page.request.get('/api/jobs')).json()) as { rows: { id: string; title: string }[] };
  const context = await browser.newContext({ baseURL, extraHTTPHeaders: { cookie: 'session.ohmstead=forged' } });
  const sheets = rows.flatMap(({ id }) =>
    ['', '/survey', '/overview', '/connections', '/schedules', '/rehearsal', '/plan', '/photographs'].map(
      (sheet) => `/jobs/${id}${sheet}`,
    ),
  );
  for (const path of ['/jobs', '/jobs/new', '/people', '/account', ...sheets]) {
    const answer = await context.request.get(path, { maxRedirects: 0 });
    const text = await answer.text();
    // A page whose frame was sent before the session was read redirects in its body.
    expect(answer.status() === 307 || text.includes('/signin'), path).toBe(true);
    for (const { title } of rows) expect(text, path).not.toContain(title);
  }
  await context.close();
});

test('headers that pretend to come from the framework or a proxy open nothing', async ({ request }) => {
  const tricks: Record<string, string>[] = [
    { 'x-middleware-subrequest': 'proxy:proxy:proxy:proxy:proxy' },
    { 'x-middleware-subrequest': 'src/proxy:src/proxy:src/proxy:src/proxy:src/proxy' },
    { 'x-forwarded-host': 'elsewhere.example', 'x-forwarded-proto': 'https' },
    { rsc: '1' },
    { 'next-router-prefetch': '1', rsc: '1' },
  ];
  for (const headers of tricks) {
    expect((await request.get('/api/jobs', { headers })).status()).toBe(401);
    const page = await request.get('/jobs', { headers, maxRedirects: 0 });
    expect([302, 303, 307, 308]).toContain(page.status());
    expect(page.headers()['location'] ?? '').not.toContain('elsewhere.example');
  }
});
