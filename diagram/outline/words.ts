import { KIND_NAME, isBar, polesOf } from '../document/kinds';
import { nameOf } from '../document/names';
import type { Cable, Installation, Part, Role, Wire } from '../document/schema';
import { lengthText, milliampsText, ratingLines } from '../layout/wording';

/** The outline's own sentences: said, not printed, so "16 A type C" where the sheet writes C16. */

const COLOUR: Readonly<Record<string, string>> = {
  BK: 'black',
  BN: 'brown',
  RD: 'red',
  OG: 'orange',
  YE: 'yellow',
  GN: 'green',
  BU: 'blue',
  VT: 'violet',
  GY: 'grey',
  WH: 'white',
  PK: 'pink',
  TQ: 'turquoise',
  GNYE: 'green and yellow',
};

/** "brown" for BN (IEC 60757); a code that is no colour is said as it stands. */
export const colourWord = (code: string): string => COLOUR[code] ?? code;

/** "switched line" and the like: what a wire is meant to carry. */
export const ROLE_WORD: Record<Role, string> = {
  line: 'line',
  switched: 'switched line',
  strapper: 'strapper',
  neutral: 'neutral',
  earth: 'earth',
  'dc+': 'battery plus',
  'dc-': 'battery minus',
};

const said = (...words: (string | false | undefined)[]): string => words.filter(Boolean).join(', ');

/** A device's ratings as one says them: "16 A type C, two poles". Empty where none is given. */
export function spokenRating(part: Part): string {
  switch (part.kind) {
    case 'mcb':
    case 'rcbo':
      return said(
        [part.rating !== undefined && `${part.rating} A`, part.curve && `type ${part.curve}`].filter(Boolean).join(' '),
        part.poles === 2 && 'two poles',
        part.kind === 'rcbo' && part.sensitivity !== undefined && milliampsText(part.sensitivity),
        part.spare && 'spare',
      );
    case 'rcd':
      return said(
        part.rating !== undefined && `${part.rating} A`,
        part.sensitivity !== undefined && milliampsText(part.sensitivity),
        part.type && `type ${part.type}`,
        part.delay === 'S' && 'delayed',
      );
    case 'isolator':
    case 'changeover':
      return said(part.rating !== undefined && `${part.rating} A`, polesOf(part) === 2 && 'two poles');
    default:
      return ratingLines(part).join(', ');
  }
}

/** "S1, switch, 10 A"; a part without a designation by its kind. */
export function partWords(part: Part, carries?: string): string {
  const kind = carries ? `${KIND_NAME[part.kind]} of ${carries}` : KIND_NAME[part.kind];
  return said(part.ref, part.ref && part.label === undefined ? kind : said(part.label, kind), spokenRating(part));
}

/** "3 by 2.5, 24 m" */
export function cableWords(cable: Cable): string {
  return said(`${cable.cores ?? 3} by ${cable.csa} square millimetres`, lengthText(cable.length));
}

/** The far end of a wire as one says it: "terminal 2 of Q3". */
export function endWords(doc: Installation, part: Part | undefined, id: string, mark: string): string {
  if (!part) return `${id}, which is not drawn`;
  return `${isBar(part.kind) ? 'screw' : 'terminal'} ${mark} of ${nameOf(doc, part)}`;
}

/** "line, brown, in the cable 3 by 2.5, 24 m" */
export const wireWords = (wire: Wire, cable: Cable | undefined): string =>
  said(
    ROLE_WORD[wire.role],
    wire.colour && colourWord(wire.colour),
    cable ? `in the cable ${cableWords(cable)}` : undefined,
  );

const plural = (word: string): string =>
  /(s|x|ch|sh)$/.test(word) ? `${word}es` : `${word.replace(/([^aeiou])y$/, '$1ie')}s`;

/** "2 switches, lamp 9 W": what stands in a room, the same things counted. Joints are not spoken of. */
export function contentWords(parts: readonly Part[]): string {
  const counts = new Map<string, { kind: string; rating: string; count: number }>();
  for (const part of parts) {
    if (isBar(part.kind)) continue;
    const rating = part.kind === 'switch' || part.kind === 'regulator' ? '' : spokenRating(part);
    const key = `${part.kind} ${rating}`;
    const found = counts.get(key);
    if (found) found.count++;
    else counts.set(key, { kind: KIND_NAME[part.kind], rating, count: 1 });
  }
  return [...counts.values()]
    .map(({ kind, rating, count }) => [count === 1 ? kind : `${count} ${plural(kind)}`, rating].filter(Boolean).join(' '))
    .join(', ');
}

/** "1 part", "3 parts" */
export const counted = (count: number, word: string): string => `${count} ${count === 1 ? word : plural(word)}`;
