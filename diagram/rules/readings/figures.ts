import { workOutBackups } from '../../circuit/backup-figures';
import type { Drawn } from '../../circuit/drawn';
import { workOutFigures } from '../../circuit/way-figures';
import { practices } from '../../practices';
import type { Context } from '../context';
import { once } from './once';

/** A home in numbers, by the practice it is judged by. */
export const figuresOf = once(({ graph, evaluation, sections, earth, practice }) =>
  workOutFigures({ graph, evaluation, sections, earth, practice: practices[practice] }),
);

/** The chains of devices, from the source on, that anything draws through: each once. */
export const chainsOf = once(
  (context: Context): readonly (readonly string[])[] => [
    ...new Set(figuresOf(context).drawn.map(({ lineDevices }) => lineDevices)),
  ],
);

/** Names of the conditions in which any of these is fed, in their order. */
export const fedIn = ({ evaluated }: Context, drawn: readonly Drawn[]): string[] =>
  evaluated
    .filter(({ points }) => drawn.some(({ part }) => points.get(part.id)?.fed))
    .map(({ condition }) => condition.name);

/** Names of the conditions in which current flows through any of these devices. */
export const flowsIn = ({ evaluated }: Context, devices: readonly string[]): string[] =>
  evaluated
    .filter(({ points }) => [...points.values()].some(({ lineDevices }) => lineDevices.some((id) => devices.includes(id))))
    .map(({ condition }) => condition.name);

/** Names of the conditions in which the supply is live. */
export const onMains = ({ evaluated }: Context): string[] =>
  evaluated.filter(({ condition }) => condition.base === 'mains').map(({ condition }) => condition.name);

/** Each backup source in numbers, by designation. */
export const backupsOf = once((context: Context) =>
  workOutBackups(context.graph, context.evaluation, figuresOf(context).drawn),
);
