import type { Installation, PracticeId } from '../document/schema';
import { buildContext, type Context } from './context';
import type { Examination, LoadResult, WayResult } from './examination';
import { rules } from './index';
import { runRules } from './run';

/** Lamps, fans and appliances, and sockets that a load is assumed at. */
function loadResults({ evaluated, graph }: Context): LoadResult[] {
  return graph.document.parts
    .filter((part) => part.kind === 'lamp' || part.kind === 'fan' || part.kind === 'appliance' || (part.kind === 'socket' && part.load !== undefined))
    .map((part) => ({
      part: part.id,
      conditions: Object.fromEntries(
        evaluated.map(({ condition, points }) => {
          const state = points.get(part.id)!;
          return [
            condition.name,
            {
              fed: state.fed,
              from: state.source?.part.id ?? null,
              volts: null,
              overcurrent: state.overcurrent,
              rcd: state.rcd,
            },
          ];
        }),
      ),
    }));
}

function wayResults(context: Context): WayResult[] {
  return context.ways.map((way) => {
    const section = context.sections.find(({ device }) => device.id === way.device)!;
    const watts = section.points.reduce((sum, part) => sum + ((part.kind === 'socket' ? part.load : 'watts' in part ? part.watts : 0) ?? 0), 0);
    const rcd = section.points.map((part) => context.evaluated[0]?.points.get(part.id)?.rcd ?? null).find((id) => id !== null) ?? null;
    return {
      part: way.device,
      label: way.label,
      ib: null,
      in: 'rating' in section.device ? (section.device.rating ?? null) : null,
      iz: null,
      capacity: null,
      dropPercent: null,
      zs: null,
      zsMax: null,
      disconnects: null,
      rcd,
      connectedWatts: watts,
      demandWatts: watts,
      points: section.points.length,
    };
  });
}

/**
 * Examines a home: what is wrong with it and what it comes to. Pure: the same document gives the same answer, byte for byte.
 * @param practice judged by this practice instead of the document's own
 */
export function examine(doc: Installation, practice: PracticeId = doc.practice): Examination {
  const context = buildContext(doc, practice);
  const { supply } = context.document;
  return {
    schema: 1,
    title: doc.title,
    findings: runRules(context, rules),
    ways: wayResults(context),
    supply: {
      demandWatts: 0,
      demandAmps: 0,
      ipf: supply.zln === undefined ? null : supply.voltage / supply.zln,
      conditions: context.evaluated.map(({ condition }) => condition.name),
      lines: [],
    },
    backup: [],
    loads: loadResults(context),
  };
}
