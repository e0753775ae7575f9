import type { Bend, Face, Installation } from '../document/schema';
import { bendKey, stretchesOf } from '../layout/bends';
import type { SceneRun } from '../layout/scene';
import { MODULE } from '../symbols/types';
import type { Command, Refusal } from './types';

/** Leading a run by hand: a stretch is moved at right angles to itself and stays on its line until the run is routed again. */

/** What is asked of a run: its way, and what it carries. */
type Led = Pick<SceneRun, 'wires' | 'points' | 'cable'>;

const named = (doc: Installation, run: Led): string => {
  const cable = doc.cables.find(({ id }) => id === run.cable);
  return cable?.ref ? `cable ${cable.ref}` : run.cable ? 'a cable' : 'a wire';
};

/**
 * Moves a stretch of a run to another line.
 * @param stretch number of the stretch, from the run's first end
 * @param to 1/100 mm: x of an upright stretch, y of a level one; taken to the module
 */
export function bendRun(doc: Installation, face: Face, run: Led, stretch: number, to: number): Command | Refusal {
  const [a, b] = [run.points[stretch], run.points[stretch + 1]];
  if (!a || !b) return { refused: 'That run has no such stretch.' };
  const at = Math.round(to / MODULE) * MODULE;
  const bend: Bend = a.x === b.x ? { x: at } : { y: at };
  const key = bendKey(face, run.wires);
  const bends = doc.sheet?.bends?.[key] ?? [];
  const led = stretchesOf(run.points, bends);
  const own = led.get(stretch);
  const before = Math.max(-1, ...[...led].filter(([i]) => i < stretch).map(([, k]) => k));
  const next =
    own === undefined
      ? [...bends.slice(0, before + 1), bend, ...bends.slice(before + 1)]
      : bends.map((kept, k) => (k === own ? bend : kept));
  return { label: `Lead ${named(doc, run)} by hand`, patch: { set: { bends: { [key]: next } } } };
}

/** The longest stretch of a run that lies across a direction: what an arrow key moves. */
export function stretchAcross({ points }: SceneRun, direction: 'x' | 'y'): number | null {
  let longest = 0;
  let found: number | null = null;
  for (let i = 0; i + 1 < points.length; i++) {
    const [a, b] = [points[i]!, points[i + 1]!];
    const length = a[direction] === b[direction] ? Math.abs(a.x - b.x) + Math.abs(a.y - b.y) : 0;
    if (length <= longest) continue;
    longest = length;
    found = i;
  }
  return found;
}

/** Takes back what was set by hand on some runs of a face, or on all of them: the sheet finds their way again. */
export function routeAgain(doc: Installation, face: Face, wires: readonly string[]): Command | Refusal {
  const keys = Object.keys(doc.sheet?.bends ?? {}).filter((key) => {
    const [of, wire] = [key.slice(0, key.indexOf(':')), key.slice(key.indexOf(':') + 1)];
    return of === face && (wires.length === 0 || wires.includes(wire));
  });
  if (keys.length === 0)
    return { refused: wires.length > 0 ? 'No stretch of it is led by hand.' : 'No run is led by hand here.' };
  return { label: `Route ${keys.length === 1 ? 'a run' : `${keys.length} runs`} again`, patch: { remove: { bends: keys } } };
}
