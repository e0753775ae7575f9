import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { smallHome } from '@/diagram/document/home';

const root = path.resolve(import.meta.dirname, '../..');
const examples = path.join(root, 'tests/fixtures/examples');
let folder: string;

beforeAll(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'check-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const write = (name: string, content: unknown): string => {
  const file = path.join(folder, name);
  writeFileSync(file, typeof content === 'string' ? content : JSON.stringify(content));
  return file;
};

function check(...args: string[]) {
  const { stdout, stderr, status } = spawnSync(process.execPath, ['--import', 'tsx', 'lib/scripts/check.ts', ...args], {
    cwd: root,
    encoding: 'utf8',
  });
  const lines =
    stdout === ''
      ? []
      : stdout
          .trimEnd()
          .split('\n')
          .map((line) => JSON.parse(line));
  return { lines, stderr, status };
}

describe('the check command', () => {
  it('prints one JSON object for a clean home and exits 0', () => {
    const { lines, status, stderr } = check(path.join(examples, 'clean-flat.json'));
    expect(status).toBe(0);
    expect(stderr).toBe('');
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatchObject({
      schema: 1,
      file: path.join(examples, 'clean-flat.json'),
      title: 'Signal cottage',
    });
    expect(Object.keys(lines[0])).toEqual(expect.arrayContaining(['findings', 'ways', 'supply', 'backup', 'loads']));
    expect(lines[0].supply.conditions).toEqual(['mains']);
    expect(lines[0].ways.map(({ part }: { part: string }) => part)).toEqual(['Q11', 'Q12', 'Q13']);
    expect(lines[0].loads.find(({ part }: { part: string }) => part === 'E5').conditions.mains).toMatchObject({
      fed: true,
      from: 'SUP',
      overcurrent: 'Q13',
      rcd: 'Q2',
    });
  });

  it('exits 1 for a danger, naming rule, parts and clause', () => {
    const { lines, status } = check(path.join(examples, 'switched-neutral.json'));
    expect(status).toBe(1);
    expect(lines[0].findings[0]).toMatchObject({
      rule: 'switched-neutral',
      severity: 'danger',
      parts: ['S2'],
      conditions: ['mains'],
    });
    expect(lines[0].findings[0].clause).toContain('BS 7671, 132.14.1');
  });

  it('checks many files in one process, one line a file, and exits with the worst', () => {
    const names = ['clean-flat', 'missing-earth', 'clean-backup-home'].map((name) =>
      path.join(examples, `${name}.json`),
    );
    const { lines, status } = check(...names);
    expect(lines.map(({ file }) => file)).toEqual(names);
    expect(status).toBe(1);
  });

  it('says the path and the reason of an invalid document, exits 2, and goes on', () => {
    const bad = write('bad.json', { ...smallHome().document(), supply: { system: 'IT', voltage: 230, frequency: 50 } });
    const { lines, status, stderr } = check(bad, path.join(examples, 'clean-flat.json'));
    expect(status).toBe(2);
    expect(stderr).toBe('');
    expect(lines[0]).toEqual({ file: bad, errors: [{ path: 'supply.system', message: expect.any(String) }] });
    expect(lines[1].title).toBe('Signal cottage');
  });

  it.each([
    ['not JSON', '{ "schema": 1,', '(file)'],
    ['an empty file', '', '(file)'],
    ['a list', [], '(file)'],
    [
      'an unknown field of a part',
      { ...smallHome().document(), parts: [{ id: 'a', kind: 'lamp', colour: 'red' }] },
      'parts.0',
    ],
    [
      'a negative rating',
      { ...smallHome().document(), parts: [{ id: 'a', kind: 'fuse', rating: -1 }] },
      'parts.0.rating',
    ],
    ['an unknown kind', { ...smallHome().document(), parts: [{ id: 'a', kind: 'teapot' }] }, 'parts.0.kind'],
    [
      'one id twice',
      {
        ...smallHome().document(),
        parts: [
          { id: 'a', kind: 'supply' },
          { id: 'a', kind: 'meter' },
        ],
      },
      'parts.1.id',
    ],
  ])('exits 2 for %s', (name, content, where) => {
    const { lines, status } = check(write(`${name.replaceAll(' ', '-')}.json`, content as object));
    expect(status).toBe(2);
    expect(lines[0].errors[0].path).toBe(where);
    expect(lines[0].errors[0].message.length).toBeGreaterThan(5);
  });

  it('exits 2 for a file that is not there', () => {
    const { lines, status } = check(path.join(folder, 'nowhere.json'));
    expect(status).toBe(2);
    expect(lines[0].errors[0].message).toMatch(/cannot be read/);
  });

  it('takes a loose wire end for a finding, not for an invalid file', () => {
    const { lines, status } = check(write('loose.json', smallHome().line('JL11', 'GONE:1').document()));
    expect(status).toBe(1);
    expect(lines[0].findings.map(({ rule }: { rule: string }) => rule)).toContain('loose-wire');
  });

  it('judges by another practice when asked', () => {
    const lampsWithoutRcd = write('lamps.json', smallHome({ rcd: false }).drop('X1').document());
    expect(check(lampsWithoutRcd).status).toBe(0);
    const { lines, status } = check(lampsWithoutRcd, '--practice', 'GB');
    expect(status).toBe(1);
    expect(lines[0].findings[0].rule).toBe('no-rcd');
  });

  it.each([[[]], [['--practice', 'FR', 'x.json']], [['--verbose', 'x.json']]])(
    'explains a wrong command line on stderr: %j',
    (args) => {
      const { lines, status, stderr } = check(...args);
      expect(lines).toEqual([]);
      expect(status).toBe(2);
      expect(stderr).toMatch(/Usage/);
    },
  );
});
