import { polesOf } from '../document/kinds';
import type { Part } from '../document/schema';

/**
 * What joins two terminals inside a part.
 * - `device`: a pole of a protective device, isolator or meter; closed unless somebody opens it
 * - `switch`: a plain control contact (switch, two-pole switch, regulator)
 * - `select`: a contact of a two-way or cross switch, closed in one of its positions
 * - `changeover`: closed in position A or B
 * - `bypass`, `through`: an inverter's in.L-out.L and in.N-out.N
 * - `ground`: an inverter's in.E-out.E, always closed
 * - `bond`: an inverter's out.N-out.E, closed on battery only; never a neutral
 * - `plug`: a pin in its socket
 */
export type LinkKind =
  'device' | 'switch' | 'select' | 'changeover' | 'bypass' | 'through' | 'ground' | 'bond' | 'plug';

export interface Link {
  kind: LinkKind;
  from: string;
  to: string;
  /** the position in which a `select` or `changeover` contact is closed */
  position?: string;
}

const pole = (kind: LinkKind, from: string, to: string, position?: string): Link => ({
  kind,
  from,
  to,
  ...(position && { position }),
});

/** Contacts inside a part, by terminal mark; a plug's pins are joined to its socket by the graph, not here. */
export function linksOf(part: Part): Link[] {
  switch (part.kind) {
    case 'fuse':
      return [pole('device', '1', '2')];
    case 'meter':
      return [pole('device', '1', '4'), pole('device', '2', '3')];
    case 'isolator':
    case 'mcb':
    case 'rcd':
    case 'rcbo':
      return polesOf(part) === 2 ? [pole('device', '1', '2'), pole('device', '3', '4')] : [pole('device', '1', '2')];
    case 'changeover':
      return [
        pole('changeover', 'A1', '2', 'A'),
        pole('changeover', 'B1', '2', 'B'),
        ...(polesOf(part) === 2 ? [pole('changeover', 'A3', '4', 'A'), pole('changeover', 'B3', '4', 'B')] : []),
      ];
    case 'inverter':
      return [
        pole('bypass', 'in.L', 'out.L'),
        pole('through', 'in.N', 'out.N'),
        pole('ground', 'in.E', 'out.E'),
        ...(part.bond ? [pole('bond', 'out.N', 'out.E')] : []),
      ];
    case 'switch':
    case 'regulator':
      return [pole('switch', '1', '2')];
    case 'switch-2pole':
      return [pole('switch', '1', '2'), pole('switch', '3', '4')];
    case 'switch-2way':
      return [pole('select', 'C', '1', '1'), pole('select', 'C', '2', '2')];
    case 'switch-cross':
      return [
        pole('select', '1', '2', 'straight'),
        pole('select', '3', '4', 'straight'),
        pole('select', '1', '4', 'crossed'),
        pole('select', '3', '2', 'crossed'),
      ];
    default:
      return [];
  }
}
