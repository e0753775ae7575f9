import type { Part } from '../document/schema';
import type { Practice } from '../practices/types';
import type { Graph } from '../terminals/graph';
import { pathTo, reaches } from '../terminals/reach';
import type { Section } from '../terminals/ways';
import type { Earth } from './earth';
import type { EarthPaths } from './earth-paths';
import type { Evaluation } from './evaluate';
import { earthFault, externalOhm, timeLimit, type EarthFault } from './way-faults';
import { lacksCable, ohmOf, supplySide } from './way-paths';

/**
 * A fault to earth at the far end of a feeder: where nothing is used before the next devices, at the board that it
 * feeds.
 */
export interface FeederFault {
  /** the part at which the feeder arrives */
  at: Part;
  /** node of the earth that arrives with it */
  earth: number;
  fault: EarthFault;
}

export interface FeederInput {
  graph: Graph;
  evaluation: Evaluation;
  earth: Earth;
  earthPaths: EarthPaths;
  practice: Practice;
}

/** The earth that comes with a line: the earth core of its cable, else the earth bar of the place it arrives at. */
function earthBeside({ graph, earth }: FeederInput, cable: string, place: string | undefined): number | undefined {
  for (const { role, cable: own, from, to } of graph.wires.values()) {
    if (role !== 'earth' || own !== cable) continue;
    const ends = [from, to].map((end) => graph.node(...end)!);
    const here = ends.find((node) => graph.partOf[node]!.place === place && reaches(earth.reached, node));
    if (here !== undefined) return here;
  }
  const bar = graph.partOf.findIndex(
    (part, node) => part.kind === 'earth-bar' && part.place === place && reaches(earth.reached, node),
  );
  return bar < 0 ? undefined : bar;
}

/**
 * Judges a section that feeds other devices only, by its worst end on mains; null where it leaves no place, lies
 * before the
 * origin, or a value is missing.
 */
export function feederFault(input: FeederInput, section: Section): FeederFault | null {
  const { graph, evaluation, earthPaths, practice } = input;
  const { supply } = graph.document;
  const external = externalOhm(supply);
  const mains = evaluation.evaluated.find(({ condition }) => condition.base === 'mains');
  const stand = mains?.stands.find(({ shorted }) => !shorted);
  if (external === undefined || !stand || section.backup) return null;
  const outside = supplySide(graph);
  if (graph.contactsOf.get(section.device.id)!.some((number) => outside.has(number))) return null;
  const walk = stand.line.find((line) => reaches(line, section.downstream));
  if (!walk) return null;

  let worst: FeederFault | null = null;
  for (const number of section.edges) {
    const { wire, a, b } = graph.edges[number]!;
    const end = walk.via[b] === number ? b : walk.via[a] === number ? a : undefined;
    if (wire?.cable === undefined || !graph.cables.has(wire.cable) || end === undefined) continue;
    const at = graph.partOf[end]!;
    const earth = earthBeside(input, wire.cable, at.place);
    const path = pathTo(graph, walk, end).filter((edge) => !outside.has(edge));
    const r2 = earthPaths.r2(earth);
    if (earth === undefined || r2 === null || path.some((edge) => lacksCable(graph, edge))) continue;
    const r1 = path.reduce((sum, edge) => sum + ohmOf(graph, edge), 0);
    const lineDevices = path.flatMap((edge) => {
      const { kind, part } = graph.edges[edge]!;
      return kind === 'device' ? [part!] : [];
    });
    const withinS = timeLimit(practice, supply, section.device, []);
    const fault = earthFault(graph, practice, { way: section.device.id, lineDevices }, external + r1 + r2, withinS);
    if (!worst || fault.zs > worst.fault.zs) worst = { at, earth, fault };
  }
  return worst;
}
