import type { Page } from 'playwright/test';
import accounts from '../../lib/server/demo/accounts.json' with { type: 'json' };

export type DemoRole = 'electrician' | 'apprentice' | 'trainer' | 'admin';

/** Signs one of the demo's people in by request, as the sign-in sheet would. */
export async function signInAs(page: Page, role: DemoRole): Promise<void> {
  const { email } = accounts.people.find(({ roles }) => roles.includes(role))!;
  const { csrfToken } = (await (await page.request.get('/api/auth/csrf')).json()) as { csrfToken: string };
  const answer = await page.request.post('/api/auth/callback/credentials', {
    form: { csrfToken, email, password: accounts.password, json: 'true' },
    headers: { origin: new URL((await page.request.get('/signin')).url()).origin },
  });
  if (!answer.ok()) throw new Error(`The ${role} of the demo could not sign in: ${answer.status()}`);
}
