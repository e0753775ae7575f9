import type { Demand } from '../calculations/maximum-demand';
import { byCode, type Part } from '../document/schema';
import type { Practice } from '../practices/types';
import type { Graph } from '../terminals/graph';
import type { Section } from '../terminals/ways';
import { listDrawn, type Drawn } from './drawn';
import type { Earth } from './earth';
import { workOutEarthPaths, type EarthPaths } from './earth-paths';
import type { Evaluation } from './evaluate';
import { sectionCables, type SectionCable } from './way-cables';
import { demandOf, wayLoads, type WayLoad } from './way-demand';
import { earthFault, externalOhm, timeLimit, type EarthFault } from './way-faults';
import { feederFault, type FeederFault } from './feeder-faults';
import { workOutPaths, type Fed, type Paths } from './way-paths';

/** What one overcurrent device and the cables behind it come to. */
export interface WayFigures {
  section: Section;
  device: Part;
  /** A, the device's rating; null where not given */
  inA: number | null;
  /** what draws by this device first of all: its own points, and the charger of an inverter behind it */
  drawn: readonly Drawn[];
  /** A and W, all that passes the device, after diversity; null while a load of it has no watts */
  ibA: number | null;
  demandWatts: number | null;
  connectedWatts: number;
  cables: readonly SectionCable[];
  /** the load at which most volts are lost, with its limit; null where none can be reckoned */
  worstDrop: { at: Drawn; fed: Fed; percent: number } | null;
  /** the largest loop of a fault to earth on mains; null where nothing earthed is fed, or a value is missing */
  fault: EarthFault | null;
  faultAt: Drawn | null;
  /** the same for a section that feeds other devices only; null where something is used in it */
  feeder: FeederFault | null;
}

type Demands = Map<string, { ways: readonly string[]; demand: Demand }>;

/** What flows together through devices, from what draws behind each of them. */
export interface Together {
  /** ids of the ways behind a device, itself among them when it is one */
  waysBehind(device: string): readonly string[];
  /** the first thing, by id, that draws through a device; undefined where nothing does */
  firstBehind(device: string): Drawn | undefined;
  /** demand of all that passes a device, after diversity */
  demandBehind(device: string): Demand;
  /** demand of the home on mains */
  demand: Demand;
  /** demands that were asked for, by the ids of their ways */
  demands: Demands;
  /** all that passes an overcurrent device, A and W */
  carriedBy(device: string): Pick<WayFigures, 'ibA' | 'demandWatts' | 'connectedWatts'>;
}

/** Everything the rules and the schedules read of a home in numbers; worked out once. */
export interface Figures extends Together {
  practice: Practice;
  drawn: readonly Drawn[];
  loads: ReadonlyMap<string, WayLoad>;
  paths: Paths;
  earth: EarthPaths;
  /** by id of the device, for every section */
  ways: ReadonlyMap<string, WayFigures>;
}

export interface FiguresInput {
  graph: Graph;
  evaluation: Evaluation;
  sections: readonly Section[];
  earth: Earth;
  practice: Practice;
}

interface Behind {
  first: Drawn;
  ways: Set<string>;
}

/** What draws through each device, by its id. */
function indexBehind(drawn: readonly Drawn[]): ReadonlyMap<string, Behind> {
  const behind = new Map<string, Behind>();
  const seen = new Set<readonly string[]>();
  for (const each of drawn) {
    // All that draws through the same devices is of one way: the first of it tells.
    if (each.way === null || seen.has(each.lineDevices)) continue;
    seen.add(each.lineDevices);
    for (const device of each.lineDevices) {
      const entry = behind.get(device);
      if (entry) entry.ways.add(each.way);
      else behind.set(device, { first: each, ways: new Set([each.way]) });
    }
  }
  return behind;
}

/** Adds up what draws behind each device. @param known demands that were worked out before, where they stand */
export function addUp(
  drawn: readonly Drawn[],
  loads: ReadonlyMap<string, WayLoad>,
  practice: Practice,
  known?: Demands,
): Together {
  const behind = indexBehind(drawn);
  const listed = new Map<string, readonly string[]>();
  const waysBehind = (device: string) => {
    const ways = listed.get(device) ?? [...(behind.get(device)?.ways ?? [])].sort(byCode);
    listed.set(device, ways);
    return ways;
  };
  // Devices in series carry the same ways: their demand is worked out once.
  const demands: Demands = new Map();
  const together = (ways: readonly string[]): Demand => {
    const key = ways.join(' ');
    const list = () => ways.map((id) => loads.get(id)!);
    const { demand } = demands.get(key) ?? known?.get(key) ?? { demand: demandOf(list(), practice) };
    demands.set(key, { ways, demand });
    return demand;
  };
  const onMains = new Set<string>();
  for (const { way, source } of drawn) if (way !== null && source?.kind === 'mains') onMains.add(way);
  return {
    waysBehind,
    firstBehind: (device) => behind.get(device)?.first,
    demandBehind: (device) => together(waysBehind(device)),
    demands,
    demand: together([...onMains].sort(byCode)),
    carriedBy(device) {
      const ids = waysBehind(device);
      const demand = ids.length === 1 && ids[0] === device ? loads.get(device)! : together(ids);
      const allKnown = ids.every((id) => loads.get(id)!.known);
      return {
        ibA: allKnown ? demand.demandA : null,
        demandWatts: allKnown ? demand.demandWatts : null,
        connectedWatts: ids.reduce((sum, id) => sum + loads.get(id)!.watts, 0),
      };
    },
  };
}

/** Works out the figures of a home from what is known of its wiring. */
export function workOutFigures({ graph, evaluation, sections, earth, practice }: FiguresInput): Figures {
  const { supply } = graph.document;
  const drawn = listDrawn(graph, evaluation);
  const loads = wayLoads(drawn, practice);
  const joints = evaluation.evaluated.flatMap(({ crossed, lineLoops }) => [...crossed, ...lineLoops]);
  const apart = new Set(joints.map(({ edge }) => edge));
  const paths = workOutPaths({ graph, practice, drawn, loads, apart });
  const earthPaths = workOutEarthPaths(graph, earth);
  const together = addUp(drawn, loads, practice);

  const feeders = { graph, evaluation, earth, earthPaths, practice };
  const external = externalOhm(supply);
  const zsOf = (each: Drawn): number | null => {
    const r1 = paths.fed.get(each.part.id)?.r1;
    const r2 = earthPaths.r2(graph.node(each.part.id, each.isPoint ? 'E' : 'in.E'));
    if (external === undefined || r1 === undefined || r1 === null || r2 === null || each.source?.kind !== 'mains')
      return null;
    return external + r1 + r2;
  };

  function figuresOf(section: Section): WayFigures {
    const { device } = section;
    const members = loads.get(device.id)?.drawn ?? [];
    let worstDrop: WayFigures['worstDrop'] = null;
    let farthest: { at: Drawn; zs: number } | null = null;
    for (const each of members) {
      const fed = paths.fed.get(each.part.id);
      if (each.isPoint && fed && fed.dropV !== null) {
        const percent = (100 * fed.dropV) / supply.voltage;
        if (!worstDrop || percent > worstDrop.percent) worstDrop = { at: each, fed, percent };
      }
      const zs = zsOf(each);
      if (zs !== null && (!farthest || zs > farthest.zs)) farthest = { at: each, zs };
    }
    const withinS = timeLimit(practice, supply, device, members);
    return {
      section,
      device,
      inA: 'rating' in device ? (device.rating ?? null) : null,
      drawn: members,
      ...together.carriedBy(device.id),
      cables: sectionCables(graph, practice, section, members),
      worstDrop,
      fault: farthest && earthFault(graph, practice, farthest.at, farthest.zs, withinS),
      faultAt: farthest?.at ?? null,
      feeder: members.length === 0 ? feederFault(feeders, section) : null,
    };
  }

  const ways = new Map(sections.map((section) => [section.device.id, figuresOf(section)] as const));
  return { practice, drawn, loads, paths, earth: earthPaths, ways, ...together };
}
