import type { Drawn } from '../../circuit/drawn';
import type { Part } from '../../document/schema';
import type { Context } from '../context';
import { figuresOf } from './figures';
import { once } from './once';

const OPENS: ReadonlySet<Part['kind']> = new Set(['isolator', 'mcb', 'rcd', 'rcbo', 'changeover']);

/** Switching devices that all of some loads hang on, from the source on: opening one of them makes all of them dead. */
export function sharedBy(context: Context, drawn: readonly Pick<Drawn, 'lineDevices'>[]): Part[] {
  const [first, ...rest] = drawn;
  if (!first) return [];
  const shared = first.lineDevices.filter((id) => rest.every(({ lineDevices }) => lineDevices.includes(id)));
  return shared.map((id) => context.graph.parts.get(id)!).filter(({ kind }) => OPENS.has(kind));
}

/** Devices that make the whole home dead on mains, from the origin on. */
export const commanders = once((context: Context): Part[] =>
  sharedBy(
    context,
    figuresOf(context).drawn.filter(({ source }) => source?.kind === 'mains'),
  ),
);
