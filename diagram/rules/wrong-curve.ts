import { INSTANT } from '../calculations/trip-curve';
import type { Drawn } from '../circuit/drawn';
import { amps, exceeds } from './readings/amounts';
import { recalled } from './clauses';
import type { Context } from './context';
import { fedIn, figuresOf } from './readings/figures';
import { lackOf } from './readings/lacking';
import { changePart } from './readings/remedies';
import type { Remedy, Rule } from './types';
import { isControl } from '../terminals/roles-of-parts';
import { capital, say, sayParts } from './readings/words';

/** Loads that one switch starts together; what has no switch of its own starts alone. */
function startGroups({ graph }: Context, drawn: readonly Drawn[]): Drawn[][] {
  const groups = new Map<string, Drawn[]>();
  for (const each of drawn) {
    const last = each.lineEdges
      .map((number) => graph.edges[number]!.part)
      .findLast((id) => id !== undefined && isControl(graph.parts.get(id)!));
    const key = last ?? each.part.id;
    groups.set(key, [...(groups.get(key) ?? []), each]);
  }
  return [...groups.values()];
}

const startOf = (group: readonly Drawn[]): number =>
  group.reduce((sum, { startAmps, amps: running }) => sum + startAmps - running, 0);

const NEXT = { B: 'C', C: 'D', D: null } as const;

/**
 * The largest start on a way, the rest of it running, against the current that its breaker holds for an instant: 3, 5 or
 * 10 times its rating for B, C, D.
 */
export const wrongCurve: Rule = {
  meta: {
    id: 'wrong-curve',
    severity: 'advice',
    group: 'overload',
    title: 'A start may open the breaker at once',
    clauses: [recalled('IEC 60898-1', 'Table 7'), recalled('IEC 60364-5-53', '533.2')],
    lesson:
      'Motors and lamp drivers draw several times their current for a moment when they start. A breaker of type ' +
      'B takes that for a short circuit, and the pump that runs well trips the way each morning.',
    remedy:
      'Fit a breaker of the next type, C or D, where the fault loop is low enough for it, or start the load on a way of its own.',
  },
  *check(context) {
    const { ways } = figuresOf(context);
    for (const { device: id } of context.ways) {
      const { device, drawn } = ways.get(id)!;
      if (
        (device.kind !== 'mcb' && device.kind !== 'rcbo') ||
        device.rating === undefined ||
        device.curve === undefined
      )
        continue;
      const groups = startGroups(context, drawn);
      if (groups.length === 0) continue;
      const worst = groups.reduce((a, b) => (startOf(b) > startOf(a) ? b : a));
      const running = drawn.reduce((sum, { amps: each }) => sum + each, 0);
      const inrush = running + startOf(worst);
      const holds = INSTANT[device.curve].holds * device.rating;
      if (startOf(worst) <= 0 || !exceeds(inrush, holds)) continue;
      const next = NEXT[device.curve];
      const remedies: Remedy[] =
        next && INSTANT[next].holds * device.rating >= inrush
          ? [changePart(`Fit type ${next}`, device, { curve: next })]
          : [];
      yield {
        heading: `${capital(say(context, id))} may open when ${sayParts(
          context,
          worst.map(({ part }) => part.id),
          3,
        )} starts`,
        message:
          `The start takes ${amps(inrush)} with the rest of the way on; a type ${device.curve} of ${device.rating} A is sure to hold ` +
          `up to ${amps(holds)} for an instant.`,
        parts: [id, ...worst.map(({ part }) => part.id)],
        conditions: fedIn(context, worst),
        remedies,
      };
    }
  },
  *lacks(context) {
    for (const { device, drawn } of figuresOf(context).ways.values())
      if (
        (device.kind === 'mcb' || device.kind === 'rcbo') &&
        device.curve === undefined &&
        drawn.some(({ startAmps, amps: running }) => startAmps > running)
      )
        yield lackOf(context, device, 'the type B, C or D');
  },
};
