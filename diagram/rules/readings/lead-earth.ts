import { natureOfNode } from '../../circuit/natures';
import type { End } from '../../document/schema';
import { reaches } from '../../terminals/reach';
import type { Context } from '../context';
import type { Remedy } from '../types';
import type { EarthGap } from './earth-gaps';
import { barsWhere, cableFrom, freeNumber, joinTo, moveTo, withEnd } from './rewire';
import { say } from './words';

/** "Join X1 to JE11", "Move the earth core to EB": the earth led to an earthed joint of the same place, else to the main bar. */
export function earthRemedies(context: Context, { parts, joints, wires, on }: EarthGap): Remedy[] {
  const { graph, earth } = context;
  const mainBar = earth.mainBar === undefined ? undefined : graph.partOf[earth.mainBar]!;
  if (!mainBar || on === 'line') return [];
  if (on === 'neutral') {
    const strays = wires.map((id) => graph.wires.get(id)!).filter((wire) => wire !== undefined);
    const ends = strays.flatMap((wire) => {
      const at = [wire.from, wire.to].find((end) => natureOfNode(graph, graph.node(...end)!) === 'N');
      return at ? [{ wire, at }] : [];
    });
    return ends.length === strays.length && ends.length > 0 ? moveTo(context, 'the earth core', ends, mainBar.id) : [];
  }
  const first = graph.parts.get(parts[0]!)!;
  const joint = joints[0];
  const from: End =
    joint === undefined
      ? [first.id, first.kind === 'inverter' ? 'in.E' : 'E']
      : [joint, String(freeNumber(context, joint))];
  const place = graph.parts.get(from[0])!.place;
  const near = barsWhere(
    context,
    (part, node) => part.id !== mainBar.id && part.place === place && part.id !== joint && reaches(earth.reached, node),
  );
  if (near.length > 0) return near.flatMap(({ id }) => joinTo(context, 'earth', from, id));
  if (place === mainBar.place) return joinTo(context, 'earth', from, mainBar.id);
  const states = context.evaluated[0]!.points;
  const cable = cableFrom(context, states.get(parts.find((id) => states.has(id)) ?? ''), mainBar.place);
  return cable ? joinTo(context, 'earth', from, mainBar.id, cable) : [];
}

/** "Move the main earth to E of the supply": the main earth core that is landed on another terminal of the supply, where E is free. */
export function mainEarthHome(context: Context, id: string): Remedy[] {
  const { graph, document } = context;
  const wire = graph.wires.get(id)!;
  const at = [wire.from, wire.to].find(([part]) => graph.parts.get(part)!.kind === 'supply');
  if (!at || wire.role !== 'earth' || document.supply.system === 'TT') return [];
  const isTaken = ([part, mark]: End) => part === at[0] && mark === 'E';
  if (document.wires.some(({ from, to }) => isTaken(from) || isTaken(to))) return [];
  const label = `Move the main earth to E of ${say(context, at[0])}`;
  return [{ label, patch: { set: { wires: [withEnd(wire, at, [at[0], 'E'])] } } }];
}
