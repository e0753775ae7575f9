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
 * npx tsx --conditions=react-server tests/diagram/mutations/rates.ts [PLACES]
 * How often each rule finds a single mistake planted in a home that is right, and how often anything else is said that
 * the mistake
 * is not: at so many places of each home, evenly spread, or at all of them where no number is given.
 */
const MUTATIONS: readonly Mutation[] = [...POLARITY, ...SEPARATION, ...SHOCK, ...OVERLOAD, ...BACKUP, ...DRAWING];

const key = ({ rule, parts, wires, conditions }: Finding): string =>
  `${rule} ${parts.join(' ')} ${wires.join(' ')} ${conditions.join(' ')}`;

interface Rate {
  planted: number;
  found: number;
  /** planted mistakes at which another danger or defect is said that the mistake is not */
  beside: number;
}

function spread<T>(list: readonly T[], most: number, start: number): T[] {
  if (list.length <= most) return [...list];
  return Array.from({ length: most }, (_, i) => list[(start * 7 + Math.floor((i * list.length) / most)) % list.length]!);
}

function main(): void {
  const most = Number(process.argv[2] ?? Infinity);
  const homes = [...cleanHomes()];
  let alarms = 0;
  const rates = new Map<string, Rate>(rules.map(({ meta }) => [meta.id, { planted: 0, found: 0, beside: 0 }]));
  homes.forEach(([name, doc], at) => {
    const clean = examine(doc).findings;
    const false_ = clean.filter(({ severity }) => severity !== 'advice').length;
    if (false_ > 0) process.stderr.write(`${name}: ${false_} false alarms\n`);
    alarms += false_;
    const before = new Set(clean.map(key));
    for (const mutation of MUTATIONS) {
      const rate = rates.get(mutation.rule)!;
      for (const wrong of spread(mutation.make(new Home(doc)), most, at)) {
        const fresh = examine(wrong.doc).findings.filter((finding) => !before.has(key(finding)));
        const isOther = ({ rule, severity }: Finding) =>
          severity !== 'advice' && rule !== mutation.rule && !mutation.also?.includes(rule);
        rate.planted++;
        if (fresh.some(({ rule }) => rule === mutation.rule)) rate.found++;
        else process.stderr.write(`missed: ${mutation.rule}, ${mutation.mistake}, ${name}\n`);
        if (fresh.some(isOther)) {
          rate.beside++;
          const names = fresh.filter(isOther).map(({ rule }) => rule);
          process.stderr.write(`beside: ${mutation.rule}, ${mutation.mistake}, ${name}: ${names.join(' ')}\n`);
        }
      }
    }
  });
  const line = (cells: (string | number)[]) =>
    process.stdout.write(`${String(cells[0]).padEnd(34)}${cells.slice(1).map((cell) => String(cell).padStart(9)).join('')}\n`);
  line(['rule', 'planted', 'found', 'rate', 'beside']);
  const sum: Rate = { planted: 0, found: 0, beside: 0 };
  for (const [rule, rate] of rates) {
    const { planted, found, beside } = rate;
    line([rule, planted, found, planted ? `${((100 * found) / planted).toFixed(1)} %` : '-', beside]);
    sum.planted += planted;
    sum.found += found;
    sum.beside += beside;
  }
  line(['all', sum.planted, sum.found, `${((100 * sum.found) / sum.planted).toFixed(2)} %`, sum.beside]);
  process.stdout.write(`${homes.length} homes that are right: ${alarms} false dangers or defects\n`);
}

main();
