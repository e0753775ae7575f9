import { diff } from '../document/patch';
import { listNames, nameOf } from '../document/names';
import { apart, type Place } from '../document/plan-scale';
import { canonical, type Cable, type Installation } from '../document/schema';
import type { Command, Refusal } from './types';

/** Measuring on a floor plan: a length that is known gives the scale, and the scale gives the lengths of runs. */

/** 1/100 mm: nearer together, two places give no scale worth the name */
const LEAST_APART = 500;
/** m: finer than that nobody measures on a plan */
const STEP = 0.1;
const MOST_METRES = 1000;
const MOST_RUN = 10_000;

/** Says how far two places on a plan are apart in the home. */
export function measurePlan(doc: Installation, planId: string, a: Place, b: Place, metres: number): Command | Refusal {
  const plan = doc.plans?.find(({ id }) => id === planId);
  if (!plan) return { refused: 'That plan is not in the drawing.' };
  if (apart(a, b) < LEAST_APART) return { refused: 'The two places lie too close together: choose a longer length.' };
  if (!(metres > 0 && metres <= MOST_METRES)) return { refused: 'Metres, up to 1000. For instance 4.2.' };
  const scale = { a: { x: a.x, y: a.y }, b: { x: b.x, y: b.y }, metres };
  const plans = doc.plans!.map((other) => (other.id === planId ? { ...other, scale } : other));
  return { label: `Measure the ${plan.name}: ${metres} m`, patch: diff(doc, canonical({ ...doc, plans })) };
}

/** What a person calls a cable: its designation, else where it goes. */
export function cableName(doc: Installation, cable: Cable): string {
  const wire = doc.wires.find((each) => each.cable === cable.id);
  const ends = wire && [wire.from[0], wire.to[0]].flatMap((id) => doc.parts.find((part) => part.id === id) ?? []);
  const way = ends?.map((part) => nameOf(doc, part)).join(' to ');
  return [cable.ref, way].filter(Boolean).join(', ') || cable.id;
}

/** Cables with those at some parts first: what has been measured mostly belongs to what is in hand. */
export function cablesFor(doc: Installation, parts: readonly string[]): { cable: Cable; name: string; own: boolean }[] {
  const held = new Set(parts);
  const own = new Set(doc.wires.flatMap(({ from, to, cable }) => (cable && (held.has(from[0]) || held.has(to[0])) ? [cable] : [])));
  return doc.cables
    .map((cable) => ({ cable, name: cableName(doc, cable), own: own.has(cable.id) }))
    .sort((a, b) => Number(b.own) - Number(a.own));
}

/** Writes a length that was measured at a cable, to 0.1 m. */
export function measureCable(doc: Installation, cableId: string, metres: number): Command | Refusal {
  const cable = doc.cables.find(({ id }) => id === cableId);
  if (!cable) return { refused: 'Choose the cable that was measured.' };
  const length = Math.round(metres / STEP) / 10;
  if (!(length > 0 && length <= MOST_RUN)) return { refused: 'That is no length of a cable.' };
  const cables = doc.cables.map((each) => (each.id === cableId ? { ...each, length } : each));
  const label = `Measure ${listNames([cableName(doc, cable)])} on the plan: ${length} m`;
  return { label, patch: diff(doc, canonical({ ...doc, cables })) };
}
