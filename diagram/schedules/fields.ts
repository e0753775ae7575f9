import type { Cable, Installation, Part } from '../document/schema';
import { KIND_NAME } from '../document/kinds';
import { ratingText, readRating, type Reading } from '../commands/rating-text';
import { practices } from '../practices';
import { readLaying, layingText } from './laying';

/** What can be typed into a schedule: how it is read from the drawing, and what a text makes of it. */

type Owner = Part | Cable;
type Values = Record<string, unknown>;

interface Field {
  /** names the field in refusals and in the history: "Metres" */
  spoken: string;
  /** as the history writes it behind a value: "mm2" */
  unit?: string;
  /** digits only: a phone shows its number pad */
  numeric?: boolean;
  /** what an empty cell stands for, in grey */
  usual?: (doc: Installation) => string;
  read(owner: Owner): string;
  write(owner: Owner, text: string, doc: Installation): Reading<Owner>;
}

const refuse = (message: string): Reading<never> => ({ ok: false, message });
const fieldOf = (owner: Owner, key: string): unknown => (owner as unknown as Values)[key];

/** The owner with a value set, or taken away where it is undefined. */
function having(owner: Owner, values: Values): Reading<Owner> {
  const next = Object.fromEntries(Object.entries({ ...owner, ...values }).filter(([, value]) => value !== undefined));
  return { ok: true, value: next as unknown as Owner };
}

const parse = (text: string): number => (/^-?\d+([.,]\d+)?$/.test(text) ? Number(text.replace(',', '.')) : NaN);
const withoutUnit = (text: string, unit = ''): string =>
  unit !== '' && text.toLowerCase().endsWith(unit.toLowerCase()) ? text.slice(0, -unit.length).trim() : text;

interface NumberField {
  spoken: string;
  unit?: string;
  least: number;
  most: number;
  whole?: boolean;
  /** may be typed away */
  optional?: boolean;
  /** the document keeps value / scale: 100 for percent */
  scale?: number;
  usual?: Field['usual'];
}

/** A number within limits. Its refusal names the field and the limits: `Metres, 1 to 500`. */
function number(key: string, { spoken, unit, least, most, whole, optional, scale = 1, usual }: NumberField): Field {
  const limits = `${spoken}, ${least} to ${most}`;
  return {
    spoken,
    unit,
    numeric: true,
    usual,
    read(owner) {
      const value = fieldOf(owner, key);
      return typeof value === 'number' ? String(Number((value * scale).toFixed(6))) : '';
    },
    write(owner, text) {
      const typed = withoutUnit(text.trim(), unit);
      if (typed === '') return optional ? having(owner, { [key]: undefined }) : refuse(limits);
      const value = parse(typed);
      if (!(value >= least && value <= most) || (whole && !Number.isInteger(value))) return refuse(limits);
      return having(owner, { [key]: scale === 1 ? value : Number((value / scale).toFixed(8)) });
    },
  };
}

/** One of a few words, by its first letters. */
function choice(key: string, spoken: string, options: readonly string[], optional = true): Field {
  return {
    spoken,
    read: (owner) => String(fieldOf(owner, key) ?? ''),
    write(owner, text) {
      const typed = text.trim().toLowerCase();
      if (typed === '' && optional) return having(owner, { [key]: undefined });
      const meant = options.filter((option) => typed !== '' && option.toLowerCase().startsWith(typed));
      return meant.length === 1 ? having(owner, { [key]: meant[0] }) : refuse(`${spoken}: ${options.join(', ')}`);
    },
  };
}

function words(key: string, spoken: string, most: number): Field {
  return {
    spoken,
    read: (owner) => String(fieldOf(owner, key) ?? ''),
    write(owner, text) {
      const typed = text.trim();
      if (typed.length > most) return refuse(`${spoken}, ${most} letters at most`);
      return having(owner, { [key]: typed === '' ? undefined : typed });
    },
  };
}

/** Sizes are those on sale: nothing else can be pulled. The protective core follows where it stood as it is sold. */
const csa: Field = {
  spoken: 'Cable, mm²',
  unit: 'mm2',
  numeric: true,
  read: (owner) => String(fieldOf(owner, 'csa') ?? ''),
  write(owner, text, doc) {
    const cable = owner as Cable;
    const practice = practices[doc.practice];
    const value = parse(text.trim().replace(/\s*mm(2|²)?$/i, ''));
    if (!practice.csaMm2.includes(value)) return refuse(`Cable, mm²: one of ${practice.csaMm2.join(', ')}`);
    const sold = (size: number) => practice.cpcMm2.value[size] ?? size;
    const follows = cable.cpc !== undefined && (cable.cpc === sold(cable.csa) || cable.cpc === cable.csa);
    return having(cable, { csa: value, ...(follows && { cpc: cable.cpc === cable.csa ? value : sold(value) }) });
  },
};

const rating: Field = {
  spoken: 'Rating',
  read: (owner) => ratingText(owner as Part),
  write(owner, text) {
    const part = owner as Part;
    if (text.trim() === '') return refuse(`Rating: for instance ${part.kind === 'fuse' ? '63 A gG' : 'B16'}`);
    const reading = readRating(part, text);
    return reading.ok ? reading : refuse(`Rating of a ${KIND_NAME[part.kind]}: ${reading.message}`);
  },
};

const laying: Field = {
  spoken: 'How it is laid',
  read: (owner) => layingText(owner as Cable),
  write: (owner, text) => readLaying(owner as Cable, text),
};

export const FIELDS = {
  label: words('label', 'Name', 80),
  ref: words('ref', 'Designation', 24),
  rating,
  csa,
  cpc: number('cpc', { spoken: 'Earth core, mm²', unit: 'mm2', least: 0.5, most: 400, optional: true }),
  length: number('length', { spoken: 'Metres', unit: 'm', least: 1, most: 500 }),
  lead: number('length', { spoken: 'Metres of lead', unit: 'm', least: 0.1, most: 50 }),
  laying,
  material: choice('material', 'Conductor', ['Cu', 'Al'], false),
  insulation: choice('insulation', 'Insulation', ['PVC', 'XLPE'], false),
  ambient: number('ambient', {
    spoken: 'Ambient, °C',
    unit: '°C',
    least: -40,
    most: 80,
    optional: true,
    usual: (doc) => String(doc.ambient),
  }),
  watts: number('watts', { spoken: 'Watts', unit: 'W', least: 0, most: 20000, optional: true }),
  load: number('load', { spoken: 'Watts taken at the outlet', unit: 'W', least: 0, most: 20000, optional: true }),
  pf: number('pf', { spoken: 'Power factor', least: 0.05, most: 1, optional: true, usual: () => '1' }),
  start: number('surge', {
    spoken: 'Start, times running',
    unit: '×',
    least: 1,
    most: 20,
    optional: true,
    usual: () => '1',
  }),
  va: number('va', { spoken: 'Inverter, VA', unit: 'VA', least: 50, most: 50000, optional: true }),
  surge: number('surge', { spoken: 'Inverter at a start, VA', unit: 'VA', least: 50, most: 100000, optional: true }),
  efficiency: number('efficiency', {
    spoken: 'Efficiency, %',
    unit: '%',
    least: 30,
    most: 100,
    optional: true,
    scale: 100,
    usual: () => '80',
  }),
  charge: number('charge', { spoken: 'Charge, A', unit: 'A', least: 0, most: 500, optional: true }),
  cutoff: number('cutoff', { spoken: 'Cutoff, V', unit: 'V', least: 1, most: 800, optional: true }),
  hoursWanted: number('hoursWanted', { spoken: 'Hours', unit: 'h', least: 0, most: 72, optional: true }),
  volts: number('volts', { spoken: 'Battery, V', unit: 'V', least: 1, most: 800, optional: true }),
  ah: number('ah', { spoken: 'Battery, Ah', unit: 'Ah', least: 1, most: 5000, optional: true }),
  hours: number('hours', {
    spoken: 'Hours of its Ah',
    unit: 'h',
    least: 1,
    most: 100,
    optional: true,
    usual: () => '20',
  }),
  count: number('count', {
    spoken: 'Batteries',
    least: 1,
    most: 64,
    whole: true,
    optional: true,
    usual: () => '1',
  }),
  chemistry: choice('chemistry', 'Chemistry', ['flooded', 'vrla', 'lfp']),
  arrangement: choice('arrangement', 'Arrangement', ['series', 'parallel']),
} satisfies Record<string, Field>;

export type FieldId = keyof typeof FIELDS;
export const fieldById = (id: FieldId): Field => FIELDS[id];
