import type { Part } from '../../document/schema';
import { practices } from '../../practices';
import type { PointState } from '../../circuit/evaluate';
import { reaches } from '../../terminals/reach';
import { isPoint, isResidual } from '../../terminals/roles-of-parts';
import type { Context } from '../context';
import { once } from './once';

/** Why a point must lie behind an rcd, and how sensitive. */
export interface Duty {
  of: 'sockets' | 'wet' | 'lighting' | 'tt';
  /** A, the largest rated residual current that serves */
  sensitivityA: number;
}

/** The strictest duty of a point; undefined where the practice asks for no rcd before it. */
function dutyOf(context: Context, part: Part): Duty | undefined {
  let strictest: Duty | undefined;
  for (const { value } of practices[context.practice].rcdDuties) {
    const { of, uptoA = Infinity } = value;
    if (!applies(context, part, of, uptoA)) continue;
    const sensitivityA = of === 'tt' ? ttLimit(context) : value.sensitivityA;
    if (!strictest || sensitivityA < strictest.sensitivityA) strictest = { of, sensitivityA };
  }
  return strictest;
}

/** Ids of points that are earthed by an electrode apart from the main earth: what holds on TT holds for them. */
export const onOwnRod = once(({ graph, earth }: Context): ReadonlySet<string> => {
  const nodes = earth.islands.order.length === 0 ? [] : [...graph.parts.values()].filter(isPoint);
  return new Set(nodes.flatMap(({ id }) => (reaches(earth.islands, graph.node(id, 'E')) ? [id] : [])));
});

function applies(context: Context, part: Part, of: Duty['of'], uptoA: number): boolean {
  const { document, graph } = context;
  switch (of) {
    case 'sockets':
      return part.kind === 'socket' && (part.rating ?? 0) <= uptoA;
    case 'lighting':
      return part.kind === 'lamp';
    case 'tt':
      return document.supply.system === 'TT' || onOwnRod(context).has(part.id);
    case 'wet': {
      const place = graph.places.get(part.place ?? '');
      return place?.kind === 'wet' || place?.zone !== undefined;
    }
  }
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
const serves = (device: Part, duty: Duty): boolean =>
  isResidual(device) && (device.sensitivity === undefined || device.sensitivity <= duty.sensitivityA + 1e-9);

/** In words: "an outlet", "a wet place" ... */
export const DUTY_NAME: Record<Duty['of'], string> = {
  sockets: 'outlets',
  wet: 'the circuit of a wet place',
  lighting: 'lighting in a dwelling',
  tt: 'every circuit on TT',
};

/** A point that must lie behind an rcd and does not, as it is fed. */
export interface Bare {
  state: PointState;
  duty: Duty;
}

/** What makes a fed point bare. A neutral led round the rcd is another rule's finding: the rcd is there, and trips. */
export function bareOf(context: Context, state: PointState): Bare[] {
  const duty = state.fed ? dutyOf(context, state.part) : undefined;
  if (!duty) return [];
  return state.lineDevices.some((id) => serves(context.graph.parts.get(id)!, duty)) ? [] : [{ state, duty }];
}

/** By number of the condition, the bare points in order of id. */
export const barePoints = once((context: Context): readonly (readonly Bare[])[] =>
  context.evaluated.map(({ points }) => [...points.values()].flatMap((state) => bareOf(context, state))),
);
