import { polesOf } from '../document/kinds';
import type { Part } from '../document/schema';
import { recalled } from './clauses';
import type { Context } from './context';
import { sayBoard, switchboards } from './readings/switchboards';
import type { Rule } from './types';
import { capital, sayParts } from './readings/words';

/** Opens both conductors of all that follows. */
const isolates = (part: Part): boolean =>
  part.kind === 'isolator' ||
  part.kind === 'rcd' ||
  part.kind === 'rcbo' ||
  (part.kind === 'mcb' && polesOf(part) === 2);

/** Devices before a way that isolate it, the main switch apart. */
function isolatorsOf(context: Context, device: string): Set<string> {
  const found = new Set<string>();
  for (const { points } of context.evaluated)
    for (const state of points.values())
      if (state.overcurrent === device)
        for (const id of state.lineDevices)
          if (id !== context.mainSwitch?.id && isolates(context.graph.parts.get(id)!)) found.add(id);
  return found;
}

/** One switchboard with lines of two ways that nothing but the main switch isolates together. */
export const sharedBoxLines: Rule = {
  meta: {
    id: 'shared-box-lines',
    severity: 'advice',
    group: 'separation',
    title: 'Two ways in one switchboard, with nothing to isolate both',
    clauses: [recalled('IEC 60364-5-53', '536.2.1.1')],
    lesson:
      'The breaker of the lamps is off and the box is opened. Behind the next switch sits the line of another way, live.',
    remedy: 'Give both ways one rcd or isolator, or keep them in separate boxes.',
  },
  *check(context) {
    const devices = new Set(context.ways.map(({ device }) => device));
    for (const board of switchboards(context)) {
      if (board.parts.some(({ id }) => devices.has(id))) continue;
      const here = new Set(board.parts.map(({ id }) => id));
      const ways = context.ways.filter(({ device }) => {
        const section = context.sections.find((each) => each.device.id === device)!;
        return [...section.nodes].some((node) => here.has(context.graph.partOf[node]!.id));
      });
      if (ways.length < 2) continue;
      const [first, ...rest] = ways.map(({ device }) => isolatorsOf(context, device));
      const common = [...first!].some((id) => rest.every((others) => others.has(id)));
      if (common) continue;
      yield {
        heading: `${ways.length} ways in ${sayBoard(context, board)}`,
        message: `${capital(sayBoard(context, board))} holds lines of ${sayParts(
          context,
          ways.map(({ device }) => device),
        )}, and nothing but the main switch isolates them together.`,
        parts: ways.map(({ device }) => device),
      };
    }
  },
};
