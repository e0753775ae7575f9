import { reaches } from '../terminals/reach';
import { isPoint } from '../terminals/roles-of-parts';
import { recalled } from './clauses';
import type { Context } from './context';
import { crossings } from './readings/crossings';
import { joinTo } from './readings/rewire';
import { capital, say } from './readings/words';
import type { Rule } from './types';

/** True once something that uses energy is wired: before that a drawing has only begun. */
function isBegun({ document, graph }: Context): boolean {
  const wired = new Set([...graph.wires.values()].flatMap(({ from, to }) => [from[0], to[0]]));
  return document.parts.some((part) => wired.has(part.id) && (isPoint(part) || part.kind === 'inverter'));
}

/** True when the main earth core itself is landed on line or neutral: the joint that it makes there says so. */
function isLedAstray(context: Context): boolean {
  const { graph, earth } = context;
  return crossings(context).some(({ edge, between }) => {
    const { a, b, wire } = graph.edges[edge]!;
    const ofSupply = [a, b].some((node) => graph.partOf[node]!.kind === 'supply');
    const ofBar = [a, b].some((node) => reaches(earth.reached, node));
    return wire!.role === 'earth' && between.includes('E') && ofSupply && ofBar;
  });
}

/** No earth bar, or one that reaches neither the supply's earth nor an electrode. */
export const noMainEarth: Rule = {
  meta: {
    id: 'no-main-earth',
    severity: 'danger',
    group: 'polarity',
    title: 'The home has no main earth',
    clauses: [recalled('IEC 60364-4-41', '411.3.1.1'), recalled('IEC 60364-5-54', '542.4.1')],
    lesson:
      'Every earth core in the home ends at one bar. If that bar hangs in the air, all cases in the home are joined to one ' +
      'another and to nothing else: one faulty appliance makes them all live.',
    remedy: 'Fit an earth bar and join it to the earth terminal of the supply, or on TT to an electrode.',
  },
  *check(context) {
    const { graph, earth, document } = context;
    if (earth.earthed || !isBegun(context) || isLedAstray(context)) return;
    const tt = document.supply.system === 'TT';
    const bar = earth.mainBar === undefined ? undefined : graph.partOf[earth.mainBar]!;
    const means = document.parts.filter(({ kind }) => kind === (tt ? 'electrode' : 'supply'));
    const electrodes = tt ? 'an earth electrode' : 'the earth terminal of the supply';
    yield {
      heading: bar ? 'The earth bar has no earth' : 'There is no earth bar',
      message:
        (bar ? `${capital(say(context, bar.id))} is not joined to ${electrodes}. ` : 'No earth bar is drawn. ') +
        'A fault to any case makes every earthed case in the home live, and no overcurrent device clears it.',
      parts: [...(bar ? [bar] : []), ...means].map(({ id }) => id),
      remedies: bar && means[0] ? joinTo(context, 'earth', [means[0].id, 'E'], bar.id) : [],
    };
  },
};
