import type { Drawn } from '../circuit/drawn';
import type { Fed } from '../circuit/way-paths';
import { supplySide } from '../circuit/way-paths';
import { KIND_NAME } from '../document/kinds';
import type { Part } from '../document/schema';
import type { Context } from '../rules/context';

/** A place along a way: how far it is, and what is lost up to there. */
export interface Station {
  name: string;
  /** m of cable from the origin */
  metres: number;
  /** percent of nominal lost up to here, line and neutral together */
  percent: number;
}

function stationName(context: Context, part: Part): string {
  if (part.ref) return part.ref;
  const place = context.graph.places.get(part.place ?? '')?.name;
  const kind = part.kind === 'line-bar' ? 'line bar' : KIND_NAME[part.kind];
  return place ? `${kind}, ${place}` : kind;
}

/**
 * The places along the way to a point, with the drop up to each: the volts lost in the line on the road there, each cable's
 * with those of the neutral in the same cable. The last is the drop that the schedule prints.
 */
export function dropStations(context: Context, at: Drawn, fed: Fed): Station[] {
  const { graph, document } = context;
  const outside = supplySide(graph);
  const cableOf = (number: number) => graph.edges[number]!.wire?.cable;
  const neutralOf = new Map<string, number>();
  for (const number of at.neutralEdges) {
    const cable = cableOf(number);
    if (cable !== undefined) neutralOf.set(cable, (neutralOf.get(cable) ?? 0) + (fed.losses.get(number) ?? 0));
  }
  const percent = (volts: number) => (100 * volts) / document.supply.voltage;
  const stations: Station[] = [{ name: 'origin', metres: 0, percent: 0 }];
  let metres = 0;
  let volts = 0;
  let node = at.source?.line ?? graph.edges[at.lineEdges[0] ?? 0]!.a;
  let behind = false;
  for (const number of at.lineEdges) {
    const { a, b, part } = graph.edges[number]!;
    node = a === node ? b : a;
    if (part !== undefined && part === at.way) behind = true;
    const cable = cableOf(number);
    const length = outside.has(number) || cable === undefined ? 0 : (graph.cables.get(cable)?.length ?? 0);
    if (cable === undefined || length === 0) continue;
    // Nothing is lost up to the board where the meter stands beside it.
    if (behind && stations.length === 1) stations[0]!.name = 'board';
    metres += length;
    volts += (fed.losses.get(number) ?? 0) + (neutralOf.get(cable) ?? 0);
    // A second core of the same cable, as of a switch drop, loses no neutral volts again.
    neutralOf.delete(cable);
    stations.push({ name: stationName(context, graph.partOf[node]!), metres, percent: percent(volts) });
  }
  const last = stations.at(-1)!;
  // A neutral that comes home by a cable of its own is lost on no stretch of the line: it counts at the end.
  last.percent = percent(fed.dropV ?? volts);
  last.name = stationName(context, at.part);
  return stations;
}
