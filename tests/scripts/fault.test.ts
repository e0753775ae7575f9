import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';

const root = fileURLToPath(new URL('../..', import.meta.url));
const run = (...args: string[]) => {
  const { status, stdout, stderr } = spawnSync(process.execPath, ['--import', 'tsx', 'lib/scripts/fault.ts', ...args], {
    cwd: root,
    encoding: 'utf8',
  });
  return { status, stderr, answer: JSON.parse(stdout) as Record<string, unknown> };
};
const HOME = 'tests/fixtures/homes/clean-backup-home.json';

describe('npm run -s fault', () => {
  test('prints one object with the fields of the contract', () => {
    const { status, answer, stderr } = run(HOME, '--at', 'M1', '--kind', 'line-to-case', '--condition', 'outage');
    expect([status, stderr]).toEqual([0, '']);
    expect(Object.keys(answer)).toEqual(
      expect.arrayContaining(['steps', 'touchVolts', 'faultAmps', 'cleared', 'clearedAfter', 'by', 'live', 'dark']),
    );
    expect(answer).toMatchObject({ condition: 'outage', cleared: true, clearedAfter: 0.04, by: 'Q5' });
    expect(
      (answer.steps as { t: number; event: string; part?: string }[]).map(({ t, event, part }) => ({ t, event, part })),
    ).toEqual([
      { t: 0, event: 'line touches the case of fan in Lantern room', part: 'M1' },
      { t: 0.04, event: 'Q5 opens', part: 'Q5' },
    ]);
  });
  test('the condition defaults to the first; a wire can be named', () => {
    const { answer } = run(HOME, '--at', 'E1', '--kind', 'neutral-open', '--wire', 'w036');
    expect(answer).toMatchObject({ condition: 'mains', cleared: false, by: null, dark: ['E1', 'M1', 'X1'] });
  });
  test('two faults in sequence', () => {
    const { answer } = run(
      'tests/fixtures/homes/lost-earth-reference.json',
      '--condition',
      'main-off',
      '--at',
      'M1',
      '--kind',
      'line-to-case',
      '--at',
      'E2',
      '--kind',
      'neutral-to-earth',
    );
    expect((answer.steps as unknown[]).length).toBe(4);
  });
  test.each([
    ['a kind that is not one', [HOME, '--at', 'M1', '--kind', 'melt'], '(command line)'],
    ['a part that is not there', [HOME, '--at', 'M9', '--kind', 'line-to-case'], 'fault'],
    ['a file that is not there', ['nowhere.json', '--at', 'M1', '--kind', 'line-to-case'], 'nowhere.json'],
    ['a file that is no document', ['package.json', '--at', 'M1', '--kind', 'line-to-case'], 'schema'],
  ])('%s exits 2 and says where', (_, args, path) => {
    const { status, answer } = run(...args);
    expect(status).toBe(2);
    expect((answer.errors as { path: string }[]).some((error) => error.path === path)).toBe(true);
  });
});
