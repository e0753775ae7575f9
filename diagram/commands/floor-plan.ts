import { diff } from '../document/patch';
import { canonical, type FloorPlan, type Installation, type Kind, type Part, type PlanPosition } from '../document/schema';
import { byDesignation, listNames, nameOf } from '../document/names';
import { symbolFor } from '../symbols';
import { MODULE } from '../symbols/types';
import { unlocked } from './lock-parts';
import type { Command } from './types';

/** 1/100 mm: the longer side of a plan on the paper, so that symbols of the drawing stand on it in their own size. */
const LONG_SIDE = 32_000;
/** modules between two parts that are put down together */
const GAP = 2;

/** What has a place in the home that somebody must find: what hangs, stands or is let into a wall. */
const ON_PLAN: ReadonlySet<Kind> = new Set<Kind>([
  ...(['meter', 'isolator', 'inverter', 'battery', 'electrode', 'bond', 'changeover'] as const),
  ...(['socket', 'switch', 'switch-2way', 'switch-cross', 'switch-2pole', 'regulator'] as const),
  ...(['lamp', 'fan', 'appliance'] as const),
]);

export const standsOnPlans = (part: Part): boolean => ON_PLAN.has(part.kind);

/** Size of a picture of so many points on the paper, in 1/100 mm. */
export function planSize(widthPx: number, heightPx: number): { width: number; height: number } {
  const scale = LONG_SIDE / Math.max(widthPx, heightPx);
  return { width: Math.max(1000, Math.round(widthPx * scale)), height: Math.max(1000, Math.round(heightPx * scale)) };
}

const STOREYS = ['Ground floor', 'First floor', 'Second floor', 'Third floor', 'Cellar', 'Attic'];

/** What the next storey is called until somebody names it otherwise. */
export function freeStorey(doc: Installation): string {
  const taken = new Set((doc.plans ?? []).map(({ name }) => name));
  return STOREYS.find((storey) => !taken.has(storey)) ?? `Storey ${taken.size + 1}`;
}

/** Where the parts stand on one plan; what is gone from the drawing is left out. */
export function placedOn(doc: Installation, planId: string): Map<string, PlanPosition> {
  const ids = new Set(doc.parts.map((part) => part.id));
  return new Map(Object.entries(doc.sheet?.plan ?? {}).filter(([id, at]) => at.on === planId && ids.has(id)));
}

/** Parts that stand on no plan yet, by room in the order of the drawing's places; those of no room come last. */
export function notPlaced(doc: Installation): { place: string | null; name: string; parts: Part[] }[] {
  const plans = new Set((doc.plans ?? []).map((plan) => plan.id));
  const loose = doc.parts
    .filter((part) => standsOnPlans(part) && !plans.has(doc.sheet?.plan?.[part.id]?.on ?? ''))
    .sort(byDesignation);
  const groups = [...doc.places.map(({ id, name }) => ({ place: id as string | null, name })), { place: null, name: 'No room' }];
  const known = new Set(doc.places.map(({ id }) => id));
  return groups
    .map(({ place, name }) => ({
      place,
      name,
      parts: loose.filter((part) => (part.place !== undefined && known.has(part.place) ? part.place : null) === place),
    }))
    .filter(({ parts }) => parts.length > 0);
}

const withPlan = (doc: Installation, plan: Record<string, PlanPosition>, plans = doc.plans): Installation =>
  canonical({ ...doc, ...(plans && { plans }), sheet: { ...doc.sheet, plan } });

const commandTo = (doc: Installation, next: Installation, label: string, parts: readonly string[] = []): Command => ({
  label,
  patch: diff(doc, next),
  ...(parts.length > 0 && { parts }),
});

/** Makes a picture the plan of a storey. */
export function addPlan(doc: Installation, plan: FloorPlan): Command {
  return commandTo(doc, canonical({ ...doc, plans: [...(doc.plans ?? []), plan] }), `Plan of the ${plan.name}`);
}

/** Names a plan anew, or lays another picture behind it: what stands on it keeps its place in proportion. */
export function changePlan(doc: Installation, planId: string, change: Partial<Omit<FloorPlan, 'id'>>): Command {
  const old = doc.plans?.find((plan) => plan.id === planId);
  if (!old) return { label: 'Change the plan', patch: {} };
  const [sx, sy] = [(change.width ?? old.width) / old.width, (change.height ?? old.height) / old.height];
  const stretched = ({ x, y }: { x: number; y: number }) => ({ x: Math.round(x * sx), y: Math.round(y * sy) });
  const scale = old.scale && { ...old.scale, a: stretched(old.scale.a), b: stretched(old.scale.b) };
  const plan = { ...old, ...(scale && { scale }), ...change };
  const moved = [...placedOn(doc, planId)].map(([id, at]): [string, PlanPosition] => [
    id,
    { ...at, ...stretched(at) },
  ]);
  const plans = doc.plans!.map((other) => (other.id === planId ? plan : other));
  const next = withPlan(doc, { ...doc.sheet?.plan, ...Object.fromEntries(moved) }, plans);
  return commandTo(doc, next, change.picture ? `Another picture behind the ${plan.name}` : `Call the plan ${plan.name}`);
}

/** Takes a plan away, and with it the places that parts had on it. The parts and the picture stay. */
export function removePlan(doc: Installation, planId: string): Command {
  const plan = doc.plans?.find(({ id }) => id === planId);
  const rest = Object.entries(doc.sheet?.plan ?? {}).filter(([, at]) => at.on !== planId);
  const plans = (doc.plans ?? []).filter(({ id }) => id !== planId);
  return commandTo(doc, withPlan(doc, Object.fromEntries(rest), plans), `Take away the plan of the ${plan?.name ?? 'storey'}`);
}

const snap = (value: number): number => Math.round(value / MODULE) * MODULE;

/** A part stays on the paper of its plan, whole. */
function within(plan: FloorPlan, part: Part, x: number, y: number): { x: number; y: number } {
  const { width, height } = symbolFor(part, 'overview');
  const most = (side: number, size: number) => Math.max(0, Math.floor((side - size) / MODULE) * MODULE);
  return {
    x: Math.min(Math.max(0, snap(x)), most(plan.width, width)),
    y: Math.min(Math.max(0, snap(y)), most(plan.height, height)),
  };
}

/**
 * Puts parts on a plan, the first with its upper left corner at the point, the others beside it in a row that turns at
 * the edge of the plan. Their places on the two faces stay as they are.
 */
export function putOnPlan(doc: Installation, planId: string, ids: readonly string[], at: { x: number; y: number }): Command {
  const plan = doc.plans?.find(({ id }) => id === planId);
  const parts = ids.flatMap((id) => doc.parts.find((part) => part.id === id) ?? []);
  if (!plan || parts.length === 0) return { label: 'Put on the plan', patch: {} };
  const set: Record<string, PlanPosition> = {};
  let { x, y } = at;
  let row = 0;
  for (const part of parts) {
    const { width, height } = symbolFor(part, 'overview');
    if (x + width > plan.width && row > 0) {
      x = at.x;
      y += row + GAP * MODULE;
      row = 0;
    }
    set[part.id] = { ...within(plan, part, x, y), on: planId };
    x += width + GAP * MODULE;
    row = Math.max(row, height);
  }
  const label = `Put ${listNames(parts.map((part) => nameOf(doc, part)), 3)} on the ${plan.name}`;
  return commandTo(doc, withPlan(doc, { ...doc.sheet?.plan, ...set }), label, Object.keys(set));
}

/** Moves parts on their plan by whole modules; they stay on its paper. */
export function moveOnPlan(doc: Installation, planId: string, ids: readonly string[], dx: number, dy: number): Command {
  const plan = doc.plans?.find(({ id }) => id === planId);
  const placed = placedOn(doc, planId);
  const set: Record<string, PlanPosition> = {};
  const names: string[] = [];
  for (const part of doc.parts) {
    const at = placed.get(part.id);
    if (!plan || !at || at.locked || !ids.includes(part.id)) continue;
    set[part.id] = { ...at, ...within(plan, part, at.x + dx, at.y + dy) };
    names.push(nameOf(doc, part));
  }
  const next = withPlan(doc, { ...doc.sheet?.plan, ...set });
  return commandTo(doc, next, `Move ${listNames(names, 3)} on the plan`, Object.keys(set));
}

/** Turns parts on their plan by a quarter, clockwise: an outlet faces the room from whichever wall it is in. */
export function turnOnPlan(doc: Installation, ids: readonly string[]): Command {
  const turned = Object.entries(doc.sheet?.plan ?? {}).filter(([id, { locked }]) => !locked && ids.includes(id));
  const set = turned.map(([id, at]): [string, PlanPosition] => {
    const { turn = 0, ...rest } = at;
    const next = ((turn + 1) % 4) as 0 | 1 | 2 | 3;
    return [id, next === 0 ? rest : { ...rest, turn: next }];
  });
  const names = doc.parts.filter((part) => turned.some(([id]) => id === part.id)).map((part) => nameOf(doc, part));
  return commandTo(
    doc,
    withPlan(doc, { ...doc.sheet?.plan, ...Object.fromEntries(set) }),
    `Turn ${listNames(names, 3)} on the plan`,
    turned.map(([id]) => id),
  );
}

/** Takes parts off the plan, back among those that are not placed. */
export function takeOffPlan(doc: Installation, ids: readonly string[]): Command {
  const loose = new Set(unlocked(doc, 'plan', ids));
  const rest = Object.entries(doc.sheet?.plan ?? {}).filter(([id]) => !loose.has(id));
  const names = doc.parts.filter((part) => loose.has(part.id)).map((part) => nameOf(doc, part));
  return commandTo(doc, withPlan(doc, Object.fromEntries(rest)), `Take ${listNames(names, 3)} off the plan`);
}
