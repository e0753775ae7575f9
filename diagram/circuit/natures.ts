import type { Role } from '../document/schema';
import type { Graph } from '../terminals/graph';

/** What a conductor can be: line, neutral, earth, or the battery's side. */
export type Nature = 'L' | 'N' | 'E' | 'D';

export function natureOfRole(role: Role): Nature {
  if (role === 'neutral') return 'N';
  if (role === 'earth') return 'E';
  return role === 'dc+' || role === 'dc-' ? 'D' : 'L';
}

const POLES: Readonly<Record<string, Nature>> = {
  '1': 'L',
  '2': 'L',
  '3': 'N',
  '4': 'N',
  A1: 'L',
  B1: 'L',
  A3: 'N',
  B3: 'N',
};

/** What a terminal is made for; undefined where the kind leaves it open (joints, switches). */
export function natureOfNode(graph: Graph, node: number): Nature | undefined {
  const part = graph.partOf[node]!;
  const mark = graph.markOf[node]!;
  switch (part.kind) {
    case 'line-bar':
      return 'L';
    case 'neutral-bar':
      return 'N';
    case 'earth-bar':
    case 'electrode':
    case 'bond':
      return 'E';
    case 'meter':
      return mark === '1' || mark === '4' ? 'L' : 'N';
    case 'fuse':
      return part.standard === 'dc' ? 'D' : 'L';
    case 'isolator':
    case 'mcb':
    case 'rcd':
    case 'rcbo':
    case 'changeover':
    case 'switch-2pole':
      return POLES[mark];
    case 'battery':
      return 'D';
    case 'inverter':
      return mark.startsWith('bat') ? 'D' : (mark.slice(-1) as Nature);
    case 'supply':
    case 'spd':
    case 'socket':
    case 'plug':
    case 'lamp':
    case 'fan':
    case 'appliance':
      return mark as Nature;
    default:
      return undefined;
  }
}
