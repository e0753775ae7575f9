import { KIND_NAME } from '../document/kinds';
import { CableSchema, PartSchema, type Cable, type Part } from '../document/schema';
import { ratingLines } from '../layout/wording';

/** Ratings as they are written on the sheet, and read back from what a person types in the same place. */

type Fields = Record<string, unknown>;
export type Reading<T> = { ok: true; value: T } | { ok: false; message: string };

const num = (text: string): number => Number(text.replace(',', '.'));
const N = '(\\d+(?:[.,]\\d+)?)';
const token = (
  pattern: string,
  read: (match: RegExpExecArray) => Fields,
): [RegExp, (match: RegExpExecArray) => Fields] => [new RegExp(`^${pattern}$`, 'i'), read];

const POWER: Partial<Record<Part['kind'], string>> = {
  lamp: 'watts',
  fan: 'watts',
  appliance: 'watts',
  socket: 'load',
};

/** Pieces of a rating by the words of the trade: what each sets. */
function tokensFor(part: Part): [RegExp, (match: RegExpExecArray) => Fields][] {
  const power = POWER[part.kind];
  return [
    token(`([BCD])${N}`, (m) => ({ curve: m[1]!.toUpperCase(), rating: num(m[2]!) })),
    token(`${N}A`, (m) => ({ rating: num(m[1]!) })),
    token(`${N}mA`, (m) => ({ sensitivity: num(m[1]!) / 1000 })),
    token(`${N}kA`, (m) => ({ icn: num(m[1]!) * 1000 })),
    token('([12])P', (m) => ({ poles: Number(m[1]) })),
    token('spare', () => ({ spare: true })),
    token('(AC|A|F|B)', (m) => ({ type: m[1]!.toUpperCase() })),
    token('S', () => ({ delay: 'S' })),
    token('(gG|dc)', (m) => ({ standard: m[1]!.toLowerCase() === 'gg' ? 'gG' : 'dc' })),
    token('class([123])', (m) => ({ class: Number(m[1]) })),
    token(`${N}VA`, (m) => ({ va: num(m[1]!) })),
    token('Nthrough', () => ({ neutral: 'through' })),
    token('Nseparate', () => ({ neutral: 'separate' })),
    token('bondsonbattery', () => ({ bond: true })),
    token(`${N}V`, (m) => ({ volts: num(m[1]!) })),
    token(`${N}Ah`, (m) => ({ ah: num(m[1]!) })),
    token(`${N}h`, (m) => ({ hoursWanted: num(m[1]!) })),
    token('(\\d+)[×x]', (m) => ({ count: Number(m[1]) })),
    token('(series|parallel)', (m) => ({ arrangement: m[1]!.toLowerCase() })),
    token('(flooded|vrla|lfp)', (m) => ({ chemistry: m[1]!.toLowerCase() })),
    token(`pf${N}`, (m) => ({ pf: num(m[1]!) })),
    ...(power
      ? [
          token(`${N}kW`, (m) => ({ [power]: Math.round(num(m[1]!) * 1000) })),
          token(`${N}W?`, (m) => ({ [power]: num(m[1]!) })),
        ]
      : []),
    ...(part.kind === 'mcb' || part.kind === 'rcbo' ? [token(N, (m) => ({ rating: num(m[1]!) }))] : []),
    ...(part.kind !== 'bond' && !power ? [token(N, (m) => ({ rating: num(m[1]!) }))] : []),
    ...(part.kind === 'bond' ? [token('(.+)', (m) => ({ to: m[1]! }))] : []),
  ];
}

/** Joins a number to the unit that follows it, and the words that belong together. */
const pieces = (text: string): string[] =>
  text
    .trim()
    .replace(/(\d)\s+(mA|kA|kW|VA|Ah|W|V|A|h|[×x])(?=\s|$)/gi, '$1$2')
    .replace(/\bN\s+(through|separate)/gi, 'N$1')
    .replace(/bonds\s+on\s+battery/gi, 'bondsonbattery')
    .replace(/class\s+/gi, 'class')
    .replace(/pf\s+/gi, 'pf')
    .split(/[\s;]+|,\s+/)
    .filter((piece) => piece !== '');

function readPieces(part: Part, text: string): Reading<Fields> {
  const fields: Fields = {};
  for (const piece of pieces(text)) {
    const found = tokensFor(part).find(([pattern]) => pattern.test(piece));
    if (!found) return { ok: false, message: `"${piece}" is no rating of ${article(part)}.` };
    Object.assign(fields, found[1](found[0].exec(piece)!));
  }
  return { ok: true, value: fields };
}

const article = (part: Part): string => `${/^[aeiou]/.test(KIND_NAME[part.kind]) ? 'an' : 'a'} ${KIND_NAME[part.kind]}`;

/** The rating as it stands on the sheet, in one line. */
export const ratingText = (part: Part): string => ratingLines(part).join(' ');

const EXAMPLE: Partial<Record<Part['kind'], string>> = {
  mcb: 'B16 2P',
  rcd: '63 A 30 mA A',
  rcbo: 'B16 30 mA A',
  fuse: '63 A gG',
  isolator: '63 A 2P',
  inverter: '1500 VA',
  battery: '12 V 150 Ah',
  socket: '16 A',
  lamp: '9 W',
  fan: '55 W',
  appliance: '2 kW',
};

/** How a rating of this kind is written, for the hint beside the field. */
export const ratingExample = (part: Part): string => EXAMPLE[part.kind] ?? '16 A';

/**
 * The part with the rating that a person typed. What stood in the text before and is typed no more is taken away; what the
 * text never shows stays.
 */
export function readRating(part: Part, text: string): Reading<Part> {
  const typed = readPieces(part, text);
  if (!typed.ok) return typed;
  const shown = readPieces(part, ratingText(part));
  const rest: Fields = { ...part };
  if (shown.ok) for (const field of Object.keys(shown.value)) if (!(field in typed.value)) delete rest[field];
  const result = PartSchema.safeParse({ ...rest, ...typed.value });
  if (result.success) return { ok: true, value: result.data };
  const [issue] = result.error.issues;
  const strange =
    issue?.code === 'unrecognized_keys'
      ? `${issue.keys.join(', ')} is no rating of ${article(part)}`
      : `${issue?.path.join('.')}: ${issue?.message}`;
  return { ok: false, message: `${strange}. For instance ${ratingExample(part)}.` };
}

/** "3×2.5 24 m": a cable as it stands beside its run. */
export const cableText = (cable: Cable): string => `${cable.cores ?? 3}×${cable.csa} ${cable.length} m`;

/** A cable as typed beside its run: `3x2.5 24 m`, `4 mm2`, `24 m`, `B2`. What is not typed stays. */
export function readCable(cable: Cable, text: string): Reading<Cable> {
  const next: Fields = { ...cable };
  const joined = text.trim().replace(/(\d)\s+(mm2|mm²|m)(?=\s|$)/gi, '$1$2');
  for (const piece of joined.split(/[\s;]+|,\s+/).filter((part) => part !== '')) {
    const cores = new RegExp(`^(\\d+)[×x]${N}(?:mm2|mm²)?$`, 'i').exec(piece);
    const size = new RegExp(`^${N}(?:mm2|mm²)$`, 'i').exec(piece);
    const length = new RegExp(`^${N}m?$`, 'i').exec(piece);
    if (cores)
      Object.assign(next, {
        cores: Number(cores[1]),
        csa: num(cores[2]!),
        cpc: cable.cpc === cable.csa ? num(cores[2]!) : cable.cpc,
      });
    else if (size)
      Object.assign(next, { csa: num(size[1]!), cpc: cable.cpc === cable.csa ? num(size[1]!) : cable.cpc });
    else if (length) next.length = num(length[1]!);
    else if (/^(A1|A2|B1|B2|C|D1)$/i.test(piece)) next.method = piece.toUpperCase();
    else if (/^(Cu|Al)$/i.test(piece)) next.material = piece.toLowerCase() === 'cu' ? 'Cu' : 'Al';
    else if (/^(PVC|XLPE)$/i.test(piece)) next.insulation = piece.toUpperCase();
    else return { ok: false, message: `"${piece}" is no size, length or way of laying. For instance 3×2.5 24 m.` };
  }
  if (next.cpc === undefined) delete next.cpc;
  const result = CableSchema.safeParse(next);
  if (result.success) return { ok: true, value: result.data };
  return {
    ok: false,
    message: `${result.error.issues[0]?.path.join('.')}: ${result.error.issues[0]?.message}. For instance 3×2.5 24 m.`,
  };
}
