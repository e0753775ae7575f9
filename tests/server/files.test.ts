import { describe, expect, it } from 'vitest';
import { GET as json } from '@/app/api/drawings/[drawingId]/json/route';
import { GET as pdf } from '@/app/api/drawings/[drawingId]/pdf/route';
import { GET as svg } from '@/app/api/drawings/[drawingId]/svg/route';
import { POST as save } from '@/app/api/drawings/[drawingId]/changes/route';
import { readDocument } from '@/diagram/document/schema';
import { fileName } from '@/lib/server/drawings/file-answer';
import { signedIn } from './browser';
import { change, makeJob, makePerson, makeUpload, place } from './factories';

async function studio(title: string) {
  const person = await makePerson();
  const { drawingId } = await makeJob(person, { title });
  return { params: { drawingId }, browser: await signedIn(person) };
}

describe('a sheet on paper', () => {
  it('is a PDF of the right size with title block, findings and the cautions, and only of a room that is there', async () => {
    const { browser, params } = await studio('Heron Row 9');
    await browser.post(save, params, change(0, place('p1', 'Study')));
    for (const [paper, box] of Object.entries({ A4: [841.89, 595.28], A3: [1190.55, 841.89] })) {
      const { status, headers, body } = await browser.ask(pdf, { params, path: `/?paper=${paper}&face=overview` });
      expect([status, headers.get('content-type')]).toEqual([200, 'application/pdf']);
      expect(body.slice(0, 5)).toBe('%PDF-');
      const [, width, height] = /MediaBox \[0 0 ([\d.]+) ([\d.]+)\]/.exec(body)!;
      expect([Number(width), Number(height)].map((n, i) => Math.abs(n - box[i]!) < 0.03)).toEqual([true, true]);
    }
    expect((await browser.ask(pdf, { params, path: '/?place=nowhere' })).status).toBe(404);
    expect((await browser.ask(pdf, { params, path: '/?paper=B5' })).status).toBe(400);
  });

  it('is an SVG that carries its letters and shows every text as text', async () => {
    const title = '</title><script>alert(1)</script><image href="https://elsewhere.example/x"/>';
    const { browser, params } = await studio(title);
    const { status, headers, body } = await browser.ask(svg, { params });
    expect([status, headers.get('content-type')]).toEqual([200, 'image/svg+xml']);
    expect(body).toMatch(/^<\?xml.*\n<svg [^>]*width="420mm" height="297mm"/);
    // Asked in this way, a failure does not print the whole file.
    for (const text of ['font/woff2;base64,', '&lt;script&gt;']) expect([text, body.includes(text)]).toEqual([text, true]);
    expect(/<script|<foreignObject|<image| on\w+="|href="/i.exec(body)).toBeNull();
  });
});

describe('a plan on paper', () => {
  const plan = { id: 'ground', name: 'Ground floor', width: 32_000, height: 24_000 };
  it('carries the picture behind it, of its own job alone, and is not there for a storey that is not drawn', async () => {
    const person = await makePerson();
    const own = await makeJob(person, { title: 'Heron Row 9' });
    const other = await makeJob(person, { title: 'Heron Row 11' });
    const browser = await signedIn(person);
    const params = { drawingId: own.drawingId };
    const [mine, theirs] = [await makeUpload(person, own.id), await makeUpload(person, other.id)];
    const lay = (base: number, picture: string) =>
      browser.post(save, params, change(base, { set: { plans: [{ ...plan, picture }] } }));
    const print = async (query = '') => browser.ask(pdf, { params, path: `/?face=plan&paper=A3${query}` });
    expect((await print()).status).toBe(404);
    await lay(0, mine.id);
    const { status, body, headers } = await print('&storey=ground');
    expect([status, body.slice(0, 5)]).toEqual([200, '%PDF-']);
    expect(headers.get('content-disposition')).toContain('Heron Row 9 plan.pdf');
    expect(body).toMatch(/\/Subtype \/Image/);
    expect((await print('&storey=attic')).status).toBe(404);
    await lay(1, theirs.id);
    const without = await print();
    expect([without.status, /\/Subtype \/Image/.test(without.body)]).toEqual([200, false]);
  });
});

describe('the document as a file', () => {
  it('is the interchange file: what is read back is what was drawn', async () => {
    const { browser, params } = await studio('Heron Row 9');
    await browser.post(save, params, change(0, place('p1', 'Study')));
    const { body, headers } = await browser.ask(json, { params });
    const read = readDocument(body);
    expect(read.ok && read.document.places).toEqual([{ id: 'p1', name: 'Study', kind: 'room' }]);
    expect(headers.get('content-disposition')).toBe(
      `attachment; filename="OH-1 Heron Row 9.json"; filename*=UTF-8''OH-1%20Heron%20Row%209.json`,
    );
  });

  it('keeps its name in any script, and no name breaks out of the header or runs as a page', async () => {
    const title = 'Reihe "9"\\..//Fähre; filename=evil.html';
    const { browser, params } = await studio(title);
    const { headers, status } = await browser.ask(json, { params });
    expect(status).toBe(200);
    const disposition = headers.get('content-disposition')!;
    expect(disposition).toMatch(/^attachment; filename="[^"\\/]+\.json"; filename\*=UTF-8''[\w%.-]+$/);
    expect(decodeURIComponent(disposition.split("''")[1]!)).toContain('Fähre');
    expect(headers.get('content-security-policy')).toMatch(/^sandbox; default-src 'none'/);
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('cache-control')).toBe('no-store');
  });

  it.each([
    [{ number: 'OH-1', title: 'a\r\nset-cookie: x', revision: 'B' }, 'OH-1 a set-cookie x, B.json'],
    [{ number: 'OH-2', title: 'x'.repeat(200), revision: '-' }, `OH-2 ${'x'.repeat(115)}.json`],
  ])('is named from %o', (block, name) => {
    expect(fileName(block, 'json')).toBe(name);
  });

  it('is held back when asked for without end', async () => {
    const { browser, params } = await studio('Heron Row 9');
    const answers = [];
    for (let i = 0; i < 32; i++) answers.push(await browser.ask(json, { params }));
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(30);
    const last = answers.at(-1)!;
    expect(last).toMatchObject({ status: 429, body: { error: 'too-many', wait: expect.any(Number) } });
    expect(Number(last.headers.get('retry-after'))).toBe(last.body.wait);
  });
});
