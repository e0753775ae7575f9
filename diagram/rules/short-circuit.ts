import { closedEdges, reach, reaches, pathTo } from '../terminals/reach';
import { recalled } from './clauses';
import { crossings } from './readings/crossings';
import { mainEarthHome } from './readings/lead-earth';
import { takeOut } from './readings/rewire';
import type { Rule } from './types';
import { sayWire } from './readings/words';

/** Line joined to neutral or earth with nothing between, in some position of the switches. */
export const shortCircuit: Rule = {
  meta: {
    id: 'short-circuit',
    severity: 'danger',
    group: 'polarity',
    title: 'Line meets neutral or earth with nothing between',
    clauses: [recalled('IEC 60364-4-43', '434.1'), recalled('IEC 60364-6', '6.4.3.3')],
    lesson:
      'With no load between, only the thin resistance of the copper limits the current: hundreds of amperes until a device opens. ' +
      'If it happens in one position of a switch only, it waits for the first person to press it.',
    remedy: 'Take away the wire that joins them, or lead it to the terminal it was meant for.',
  },
  *check(context) {
    const { graph } = context;
    for (const { edge, wire, between, conditions, switches } of crossings(context)) {
      if (!between.includes('L')) continue;
      const other = between.includes('N') ? 'neutral' : 'earth';
      const { a, b } = graph.edges[edge]!;
      yield {
        heading: `Line and ${other} are joined`,
        message:
          `The wire ${sayWire(context, wire)} joins line and ${other} with no load between` +
          `${switches.length > 0 ? ' in one position of the switches' : ''}. The full fault current flows until a device opens.`,
        parts: [...new Set([graph.partOf[a]!.id, graph.partOf[b]!.id, ...switches])],
        wires: [wire],
        conditions,
        remedies: [takeOut('Take the wire out', [wire]), ...mainEarthHome(context, wire)],
      };
    }
    const dc = closedEdges(graph, (each) => each.kind !== 'wire' && each.kind !== 'device');
    for (const battery of context.parts('battery')) {
      const plus = reach(graph, [graph.node(battery.id, '+')!], dc);
      const minus = graph.node(battery.id, '-')!;
      if (!reaches(plus, minus)) continue;
      yield {
        heading: `${context.name(battery)} is shorted`,
        message: `The two poles of ${context.name(battery)} are joined with nothing between. A battery gives thousands of amperes, and its terminals cannot be switched off.`,
        parts: [battery.id],
        wires: pathTo(graph, plus, minus).flatMap((number) => graph.edges[number]!.wire?.id ?? []),
      };
    }
  },
};
