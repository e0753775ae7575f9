import { beforeAll, describe, expect, it } from 'vitest';
import { rules } from '@/diagram/rules';
import { examine } from '@/diagram/rules/examine';
import type { Finding } from '@/diagram/rules/types';
import { BACKUP } from './backup';
import { cleanHomes } from './clean-homes';
import { DRAWING } from './drawing';
import { Home, type Mutation } from './edit';
import { OVERLOAD } from './overload';
import { POLARITY } from './polarity';
import { SEPARATION } from './separation';
import { SHOCK } from './shock';

/**
 * Every rule against single mistakes planted in homes that are right: the rule must speak, and nothing else that the
 * mistake is not. One place of each home is taken, another one in each, so that the run stays short; MUTATION_PLACES takes
 * more.
 */
const MUTATIONS: readonly Mutation[] = [...POLARITY, ...SEPARATION, ...SHOCK, ...OVERLOAD, ...BACKUP, ...DRAWING];
const PLACES = Number(process.env.MUTATION_PLACES ?? 1);
/** Said of every home with a backup source: there is no mistake to plant. */
const NOT_A_MISTAKE = new Set(['live-after-main-off']);

const homes = cleanHomes();
const key = ({ rule, parts, wires, conditions }: Finding): string =>
  `${rule} ${parts.join(' ')} ${wires.join(' ')} ${conditions.join(' ')}`;
/** Some of a list, evenly spread, beginning elsewhere in each home. */
const someOf = <T>(list: readonly T[], start: number): T[] =>
  list.length <= PLACES
    ? [...list]
    : Array.from(
        { length: PLACES },
        (_, i) => list[(start * 7 + Math.floor((i * list.length) / PLACES)) % list.length]!,
      );

describe('homes that are right', () => {
  it.each([...homes.keys()])('give no false alarm: %s', (name) => {
    const { findings } = examine(homes.get(name)!);
    expect(findings.filter(({ severity, rule }) => severity !== 'advice' || rule === 'missing-data').map(key)).toEqual(
      [],
    );
  });

  it('say what stays live behind an open main switch where there is a backup source, and only there', () => {
    for (const doc of homes.values()) {
      const said = examine(doc).findings.some(({ rule }) => rule === 'live-after-main-off');
      expect([doc.title, said]).toEqual([doc.title, doc.parts.some(({ kind }) => kind === 'inverter')]);
    }
  });
});

describe('a mistake planted in a home that is right', () => {
  const before = new Map<string, Set<string>>();
  beforeAll(() => {
    for (const [name, doc] of homes) before.set(name, new Set(examine(doc).findings.map(key)));
  });

  it.each(MUTATIONS.map((mutation) => [mutation.rule, mutation.mistake, mutation] as const))(
    '%s: %s',
    (rule, _mistake, mutation) => {
      const missed: string[] = [];
      const extra = new Set<string>();
      let planted = 0;
      for (const [at, [name, doc]] of [...homes].entries()) {
        for (const [i, wrong] of someOf(mutation.make(new Home(doc)), at).entries()) {
          planted++;
          const fresh = examine(wrong.doc).findings.filter((finding) => !before.get(name)!.has(key(finding)));
          if (!fresh.some((finding) => finding.rule === rule))
            missed.push(`${name} ${i}: ${fresh.map(({ rule: other }) => other).join(' ') || 'nothing'}`);
          for (const finding of fresh)
            if (finding.severity !== 'advice' && finding.rule !== rule && !mutation.also?.includes(finding.rule))
              extra.add(`${finding.rule} (${name}) ${finding.message}`);
        }
      }
      expect(planted).toBeGreaterThan(0);
      expect(missed).toEqual([]);
      expect([...extra]).toEqual([]);
    },
  );

  it('has been planted for every rule of the catalogue', () => {
    const planted = new Set(MUTATIONS.map(({ rule }) => rule));
    expect(rules.map(({ meta }) => meta.id).filter((id) => !planted.has(id) && !NOT_A_MISTAKE.has(id))).toEqual([]);
  });
});
