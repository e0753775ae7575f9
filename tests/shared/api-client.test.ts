import { afterEach, describe, expect, it, vi } from 'vitest';
import { callApi } from '@/lib/shared/api-client';

const answer = (make: () => Response | Promise<never>) => vi.stubGlobal('fetch', vi.fn(async () => make()));
afterEach(() => vi.unstubAllGlobals());

describe('asking a route', () => {
  it('gives the answer', async () => {
    answer(() => Response.json({ id: 1 }));
    expect(await callApi('GET', '/api/x')).toEqual({ ok: true, data: { id: 1 } });
  });

  it('takes an answer without a body', async () => {
    answer(() => new Response(null, { status: 204 }));
    expect(await callApi('POST', '/api/x')).toEqual({ ok: true, data: undefined });
  });

  it('hands a refusal over as it is', async () => {
    const refusal = { error: 'invalid', message: 'No.', fields: { name: 'Name it.' } };
    answer(() => Response.json(refusal, { status: 400 }));
    expect(await callApi('POST', '/api/x', {})).toEqual({ ok: false, offline: false, refusal });
  });

  it('says in words that nobody answered', async () => {
    answer(() => Promise.reject(new TypeError('network')));
    expect(await callApi('POST', '/api/x', {})).toMatchObject({ ok: false, offline: true, refusal: { message: expect.stringContaining('What you typed is still here') } });
  });

  it.each([200, 502])('takes a page of a proxy with status %i for no answer', async (status) => {
    answer(() => new Response('<html>', { status }));
    expect(await callApi('GET', '/api/x')).toMatchObject({ ok: false, offline: false, refusal: { error: 'failed' } });
  });
});
