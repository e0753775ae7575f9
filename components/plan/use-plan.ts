'use client';

import { useMemo, useRef, useState } from 'react';
import type { OpenDrawing } from '@/components/sheet/use-drawing';
import { useSheet } from '@/components/sheet/use-drawing';
import { moveOnPlan, notPlaced, placedOn, putOnPlan, takeOffPlan, turnOnPlan } from '@/diagram/commands/floor-plan';
import { isLocked, lockParts, stays, unlocked } from '@/diagram/commands/lock-parts';
import { isRefusal, type Command, type Refusal } from '@/diagram/commands/types';
import { guide, type Box, type Guided } from '@/diagram/layout/guides';
import { KIND_NAME } from '@/diagram/document/kinds';
import { byDesignation, nameOf } from '@/diagram/document/names';
import type { Part, PlanPosition } from '@/diagram/document/schema';
import { symbolFor } from '@/diagram/symbols';
import { turnedSize } from '@/diagram/symbols/turn';
import { boxAbout, useSuspended } from '@/components/sheet/guiding';
import { useTool, type ToolKind } from './use-tool';

export interface Point {
  x: number;
  y: number;
}

/** ms after the last arrow key until a row of them becomes one step of the history */
const NUDGE_ENDS = 700;

const suspended = (): boolean => useSuspended.getState().suspended;
const boxOf = ({ part, at }: { part: Part; at: PlanPosition }): Box => ({
  x: at.x,
  y: at.y,
  ...turnedSize(symbolFor(part, 'overview'), at.turn ?? 0),
});
/** The upper left corner of a part whose middle is at a point. */
function cornerOf(part: Part, { x, y }: Point): Point {
  const { width, height } = symbolFor(part, 'overview');
  return { x: x - width / 2, y: y - height / 2 };
}

/** What is on the plan in hand, what waits to be placed, and what the hands do. Lengths in 1/100 mm. */
export function usePlan(drawing: OpenDrawing, wanted: string | null) {
  const { store } = drawing;
  const document = useSheet(store, (state) => state.document);
  const rights = useSheet(store, (state) => state.rights);
  const selection = useSheet(store, (state) => state.selection);
  const [chosen, setChosen] = useState<string | null>(wanted);
  /** the part that is carried to its place */
  const [placing, setPlacing] = useState<string | null>(null);
  const [ghost, setGhost] = useState<Point>({ x: 0, y: 0 });
  /** how far the parts in hand are from where they stood, until the hand lets go */
  const [carried, setCarried] = useState<Point | null>(null);
  const plans = document.plans ?? [];
  const heldOn = document.sheet?.plan?.[selection.parts[0] ?? '']?.on;
  // A part that was taken in hand on another sheet opens the storey it stands on.
  const plan = plans.find(({ id }) => id === chosen) ?? plans.find(({ id }) => id === heldOn) ?? plans[0] ?? null;
  const tool = useTool(plan?.id ?? null);
  const nudge = useRef<{ timer?: ReturnType<typeof setTimeout>; by: Point }>({ by: { x: 0, y: 0 } });

  const waiting = useMemo(() => notPlaced(document), [document]);
  const placed = useMemo(() => {
    const at = plan ? placedOn(document, plan.id) : new Map<string, PlanPosition>();
    return document.parts
      .filter((part) => at.has(part.id))
      .sort(byDesignation)
      .map((part) => ({ part, at: at.get(part.id)! }));
  }, [document, plan]);
  const inHand = placed.filter(({ part }) => selection.parts.includes(part.id)).map(({ part }) => part.id);

  const say = (words: string) => store.getState().say(words);
  const describe = (part: Part): string => {
    const place = document.places.find(({ id }) => id === part.place)?.name;
    return [nameOf(document, part), part.ref && KIND_NAME[part.kind], part.ref && place].filter(Boolean).join(', ');
  };
  const run = (outcome: Command | Refusal): boolean => {
    if (isRefusal(outcome)) {
      say(outcome.refused);
      return false;
    }
    const { label, patch, parts } = outcome;
    if (!store.getState().run(label, patch)) return false;
    if (parts) store.getState().select({ parts, wires: [], terminal: null });
    return true;
  };
  const doc = () => store.getState().document;

  const take = (ids: readonly string[]) => {
    store.getState().select({ parts: ids, wires: [], terminal: null });
    const part = document.parts.find(({ id }) => id === ids[0]);
    if (part) say(describe(part));
  };

  const carry = (id: string, at: Point) => {
    setPlacing(id);
    setGhost(at);
    const part = document.parts.find((one) => one.id === id);
    if (part) say(`${describe(part)}: click where it stands, or arrows and Enter`);
  };

  /** The next part of the same room that waits, so that a room is placed click by click. */
  const after = (id: string): string | null => {
    const room = waiting.find(({ parts }) => parts.some((part) => part.id === id));
    const index = room?.parts.findIndex((part) => part.id === id) ?? -1;
    return room?.parts[index + 1]?.id ?? room?.parts.find((part) => part.id !== id)?.id ?? null;
  };

  /** Puts what is carried with its middle at the point. */
  const put = (at: Point) => {
    const part = document.parts.find(({ id }) => id === placing);
    if (!plan || !part) return;
    const { x, y } = cornerOf(part, at);
    const { dx, dy } = guideAt({ x, y, ...symbolFor(part, 'overview') }, { x: 0, y: 0 });
    const next = after(part.id);
    run(putOnPlan(doc(), plan.id, [part.id], { x: x + dx, y: y + dy }));
    setPlacing(next);
  };

  /** Where what is moved would stand, and what it is then in line with; null while nothing is. */
  const guides = (): Guided | null => {
    const carriedPart = document.parts.find(({ id }) => id === placing);
    if (carriedPart) return guideAt({ ...cornerOf(carriedPart, ghost), ...symbolFor(carriedPart, 'overview') }, { x: 0, y: 0 });
    const box = carried && boxAbout(placed.filter(({ part }) => inHand.includes(part.id)).map(boxOf));
    return box ? guideAt(box, carried) : null;
  };
  const guideAt = (box: Box, by: Point): Guided =>
    guide(placed.filter(({ part }) => placing !== null || !inHand.includes(part.id)).map(boxOf), box, by.x, by.y, !suspended());

  /** Says so where all that is in hand is locked in place. */
  const lockHolds = (): boolean => {
    const holds = inHand.length > 0 && unlocked(doc(), 'plan', inHand).length === 0;
    if (holds) say(stays(doc(), inHand));
    return holds;
  };

  const endNudge = () => {
    clearTimeout(nudge.current.timer);
    const { by } = nudge.current;
    nudge.current = { by: { x: 0, y: 0 } };
    setCarried(null);
    if (plan && (by.x !== 0 || by.y !== 0)) run(moveOnPlan(doc(), plan.id, inHand, by.x, by.y));
  };

  return {
    document,
    rights,
    plans,
    plan,
    waiting,
    placed,
    inHand,
    placing,
    ghost,
    carried,
    tool,
    guides,
    setGhost,
    describe,
    take,
    carry,
    put,
    run,
    say,
    choose: setChosen,
    drop: () => setPlacing(null),
    drag: setCarried,
    /** The hand lets go of what it dragged. */
    release(by: Point) {
      setCarried(null);
      if (!plan || lockHolds()) return;
      const box = boxAbout(placed.filter(({ part }) => inHand.includes(part.id)).map(boxOf));
      const { dx, dy } = box ? guideAt(box, by) : { dx: by.x, dy: by.y };
      run(moveOnPlan(doc(), plan.id, inHand, dx, dy));
    },
    /** Moves what is in hand by keys; a row of presses is one step. */
    nudgeBy(x: number, y: number) {
      if (!rights.edit || inHand.length === 0 || lockHolds()) return;
      const by = { x: nudge.current.by.x + x, y: nudge.current.by.y + y };
      clearTimeout(nudge.current.timer);
      nudge.current = { by, timer: setTimeout(endNudge, NUDGE_ENDS) };
      setCarried(by);
    },
    endNudge,
    takeOff() {
      if (inHand.length > 0 && !lockHolds()) run(takeOffPlan(doc(), inHand));
    },
    turn() {
      if (inHand.length > 0 && !lockHolds()) run(turnOnPlan(doc(), inHand));
    },
    /** Takes the measuring tool in hand; a run is measured only on a plan whose scale is known. */
    measure(kind: ToolKind) {
      if (!plan || !rights.edit) return;
      const unknown = kind === 'run' && !plan.scale;
      if (unknown) say('The scale comes first: two places, and how far they are apart.');
      setPlacing(null);
      tool.begin(unknown ? 'scale' : kind, { x: plan.width / 2, y: plan.height / 2 });
    },
    /** Locks what is in hand where it hangs; where all of it is, lets it go. */
    lock() {
      if (inHand.length === 0) say('Take a part in hand first.');
      else run(lockParts(doc(), 'plan', inHand, !inHand.every((id) => isLocked(doc(), 'plan', id))));
    },
    step(by: 1 | -1) {
      if (placed.length === 0) return;
      const index = placed.findIndex(({ part }) => part.id === inHand[0]);
      const next = index < 0 ? (by > 0 ? 0 : placed.length - 1) : (index + by + placed.length) % placed.length;
      take([placed[next]!.part.id]);
    },
  };
}

export type Plan = ReturnType<typeof usePlan>;
