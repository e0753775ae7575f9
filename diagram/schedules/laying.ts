import type { Reading } from '../commands/rating-text';
import type { Cable } from '../document/schema';

const METHODS = ['A1', 'A2', 'B1', 'B2', 'C', 'D1'] as const;

/** "B1, 3": the way of laying and how many loaded circuits run together, this one counted. */
export const layingText = (cable: Cable): string => `${cable.method}, ${cable.grouped ?? 1}`;

/** Reads "B1, 3", "b1 3", "C" or "3"; what is not typed stays. */
export function readLaying(cable: Cable, text: string): Reading<Cable> {
  const refusal = {
    ok: false,
    message: `How it is laid: ${METHODS.join(', ')}, then 1 to 40 circuits together, for instance B1, 3`,
  } as const;
  const pieces = text
    .toUpperCase()
    .split(/[\s,;]+/)
    .filter((piece) => piece !== '');
  if (pieces.length === 0 || pieces.length > 2) return refusal;
  let { method, grouped } = cable;
  for (const piece of pieces) {
    const named = METHODS.find((each) => each === piece);
    const count = /^\d{1,2}$/.test(piece) ? Number(piece) : NaN;
    if (named) method = named;
    else if (count >= 1 && count <= 40) grouped = count;
    else return refusal;
  }
  return { ok: true, value: { ...cable, method, ...(grouped !== undefined && { grouped }) } };
}
