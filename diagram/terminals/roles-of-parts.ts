import type { Kind, Part, PartOf } from '../document/schema';

/** Words of the trade for groups of kinds, used by every rule in the same sense. */

const OVERCURRENT: ReadonlySet<Kind> = new Set(['fuse', 'mcb', 'rcbo']);
const RESIDUAL: ReadonlySet<Kind> = new Set(['rcd', 'rcbo']);
const LOADS: ReadonlySet<Kind> = new Set(['lamp', 'fan', 'appliance']);

/** A device that opens on overcurrent in an ac circuit; the battery's dc fuse is not one. */
export const isOvercurrent = (part: Part): part is PartOf<'fuse' | 'mcb' | 'rcbo'> =>
  OVERCURRENT.has(part.kind) && !(part.kind === 'fuse' && part.standard === 'dc');

export const isResidual = (part: Part): part is PartOf<'rcd' | 'rcbo'> => RESIDUAL.has(part.kind);

export const isLoad = (part: Part): part is PartOf<'lamp' | 'fan' | 'appliance'> => LOADS.has(part.kind);

/** A place where energy is used: a lamp, fan, appliance or socket. */
export const isPoint = (part: Part): part is PartOf<'lamp' | 'fan' | 'appliance' | 'socket'> =>
  isLoad(part) || part.kind === 'socket';

/** A control contact: what a person works to have light, not to isolate. */
export const isControl = (part: Part): boolean =>
  part.kind === 'switch' ||
  part.kind === 'switch-2way' ||
  part.kind === 'switch-cross' ||
  part.kind === 'switch-2pole' ||
  part.kind === 'regulator';
