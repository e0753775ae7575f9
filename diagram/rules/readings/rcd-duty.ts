import type { Part } from '../../document/schema';
import { practices } from '../../practices';
import type { PointState } from '../../circuit/evaluate';
import { isResidual } from '../../terminals/roles-of-parts';
import type { Context } from '../context';

/** Why a point must lie behind an rcd, and how sensitive. */
export interface Duty {
  of: 'sockets' | 'wet' | 'lighting' | 'tt';
  /** A, the largest rated residual current that serves */
  sensitivityA: number;
}

/** The strictest duty of a point; undefined where the practice asks for no rcd before it. */
export function dutyOf(context: Context, part: Part): Duty | undefined {
  const { document, graph } = context;
  const place = graph.places.get(part.place ?? '');
  const applies: Record<Duty['of'], (uptoA?: number) => boolean> = {
    sockets: (uptoA = Infinity) => part.kind === 'socket' && (part.rating ?? 0) <= uptoA,
    wet: () => place?.kind === 'wet' || place?.zone !== undefined,
    lighting: () => part.kind === 'lamp',
    tt: () => document.supply.system === 'TT',
  };
  const duties = practices[context.practice].rcdDuties
    .map(({ value }) => value)
    .filter((duty) => applies[duty.of](duty.uptoA))
    .map(({ of, sensitivityA }): Duty => ({ of, sensitivityA: of === 'tt' ? ttLimit(context) : sensitivityA }));
  return duties.sort((a, b) => a.sensitivityA - b.sensitivityA)[0];
}

/** A, on TT the residual current at which the electrode stands at 50 V: RA x IdN <= 50 V (411.5.3). */
function ttLimit({ document, practice }: Context): number {
  const { ra } = document.supply;
  return ra === undefined ? Infinity : practices[practice].touchVolts.value / ra;
}

/** Residual-current devices that both the line and the neutral of a point pass, from the source on. */
export function guardsOf({ graph }: Context, state: PointState): Part[] {
  return state.lineDevices
    .map((id) => graph.parts.get(id)!)
    .filter((part) => isResidual(part) && (!state.fed || state.neutralDevices.includes(part.id)));
}

/** True when a device is sensitive enough for the duty; a device whose sensitivity is not stated is given the doubt. */
export const serves = (device: Part, duty: Duty): boolean =>
  isResidual(device) && (device.sensitivity === undefined || device.sensitivity <= duty.sensitivityA + 1e-9);

/** In words: "an outlet", "a wet place" ... */
export const DUTY_NAME: Record<Duty['of'], string> = {
  sockets: 'outlets',
  wet: 'the circuit of a wet place',
  lighting: 'lighting in a dwelling',
  tt: 'every circuit on TT',
};
