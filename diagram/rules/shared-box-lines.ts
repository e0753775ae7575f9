import { polesOf } from '../document/kinds';
import type { Part } from '../document/schema';
import type { Way } from '../terminals/ways';
import { recalled } from './clauses';
import type { Context } from './context';
import { once } from './readings/once';
import { sayBoard, switchboards } from './readings/switchboards';
import type { Rule } from './types';
import { capital, sayParts } from './readings/words';

/** Opens both conductors of all that follows. */
const isolates = (part: Part): boolean =>
  part.kind === 'isolator' ||
  part.kind === 'rcd' ||
  part.kind === 'rcbo' ||
  (part.kind === 'mcb' && polesOf(part) === 2);

/** By way, the devices before it that isolate it, the main switch apart. */
export const isolatorsByWay = once((context: Context): Map<string, Set<string>> => {
  const found = new Map<string, Set<string>>();
  const seen = new Set<readonly string[]>();
  for (const { points } of context.evaluated)
    for (const { overcurrent, lineDevices } of points.values()) {
      if (overcurrent === null || seen.has(lineDevices)) continue;
      seen.add(lineDevices);
      const isolators = found.get(overcurrent) ?? new Set<string>();
      for (const id of lineDevices)
        if (id !== context.mainSwitch?.id && isolates(context.graph.parts.get(id)!)) isolators.add(id);
      found.set(overcurrent, isolators);
    }
  return found;
});

function haveCommonIsolator(context: Context, ways: readonly Way[]): boolean {
  const [first, ...rest] = ways.map(({ device }) => isolatorsByWay(context).get(device) ?? new Set<string>());
  return [...first!].some((id) => rest.every((others) => others.has(id)));
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
    const byDevice = new Map(context.ways.map((way) => [way.device, way]));
    for (const board of switchboards(context).values()) {
      if (board.ways.size < 2 || board.held.some(({ part }) => byDevice.has(part.id))) continue;
      const held = [...board.ways].flatMap((id) => byDevice.get(id) ?? []).sort((a, b) => a.number - b.number);
      // Mains beside backup is the matter of the notice of two sources.
      const ways = [false, true]
        .map((backup) => held.filter((way) => way.backup === backup))
        .filter((same) => same.length > 1 && !haveCommonIsolator(context, same))
        .flat();
      if (ways.length === 0) continue;
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
