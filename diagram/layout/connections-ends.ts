import type { End, Part, Position } from '../document/schema';
import { symbolFor, terminalAt } from '../symbols';
import { BAR_AXIS, BAR_HEIGHT, barTerminal, type BarKind } from '../symbols/bar';
import { turnedSize } from '../symbols/turn';
import { MODULE, type Side } from '../symbols/types';
import type { Body } from './ends';
import { m } from './overview-metrics';
import { CABLE_GAP, CORE_PITCH, wordsWidth } from './connections-cables';
import type { Core, Page, PageCable } from './connections-page';
import { FOOT, FOOT_CORE, ON_BOARD, TOP, isLongBar, sizeOf } from './connections-page-state';
import type { SceneTerminal } from './scene';

/** Where cores end on a page: at terminals, and at the stubs of cables that come from or go to another place. */

export interface Stub {
  core: Core;
  x: number;
  y: number;
  side: Side;
}

export interface PlacedCable {
  cable: PageCable;
  stubs: Stub[];
  /** of its brace */
  left: number;
  right: number;
  y: number;
}

export const endName = (end: End): string => `${end[0]} ${end[1]}`;

/** Bodies and terminals of everything but long bars. */
export function fixedBodies(
  page: Page,
  positions: ReadonlyMap<string, Position>,
  marks: ReadonlyMap<string, readonly string[]>,
): Map<string, Body> {
  const bodies = new Map<string, Body>();
  for (const part of page.parts) {
    if (isLongBar(part.kind)) continue;
    const at = positions.get(part.id)!;
    const turn = part.kind === 'joint' ? 0 : (at.turn ?? 0);
    const size = part.kind === 'joint' ? sizeOf(part, marks) : turnedSize(sizeOf(part, marks), turn);
    bodies.set(part.id, {
      x: at.x,
      y: at.y,
      ...size,
      turn,
      terminals: terminalsOn(part, at, marks.get(part.id) ?? []),
    });
  }
  return bodies;
}

function terminalsOn(part: Part, at: Position, used: readonly string[]): SceneTerminal[] {
  if (part.kind === 'joint') {
    const list = used.length > 0 ? used : ['1', '2'];
    return list.map((mark, i) => {
      const t = barTerminal('joint', i);
      return { mark, x: at.x + t.x, y: at.y + t.y, side: t.side };
    });
  }
  return Object.keys(symbolFor(part, 'connections').terminals).flatMap((mark) => {
    const t = terminalAt(part, mark, at, 'connections');
    return t ? [{ mark, x: t.x, y: t.y, side: t.side }] : [];
  });
}

/** Lines up the cores of cables over (or under) the terminals they go to, in the order L, N, PE, and keeps cables apart. */
export function placeCables(
  page: Page,
  bodies: ReadonlyMap<string, Body>,
  positions: ReadonlyMap<string, Position>,
): PlacedCable[] {
  const bars = new Map(
    page.parts.filter((part) => part.kind === 'line-bar').map((part) => [part.id, positions.get(part.id)!.x - m(3)]),
  );
  // over the terminal itself, or just left of the line bar it feeds
  const wish = (core: Core): number | undefined =>
    bodies.get(core.here[0])?.terminals.find((t) => t.mark === core.here[1])?.x ?? bars.get(core.here[0]);
  // what leaves at the foot leaves below all that stands over it, whatever hangs lower beside the board
  const leaving = page.cables.flatMap(({ atFoot, cores }) => (atFoot ? cores.flatMap(({ here }) => bodies.get(here[0]) ?? []) : []));
  const edge = leaving.length > 0 ? Math.max(...leaving.map(({ x, width }) => x + width)) + m(14) : Infinity;
  const lowest = Math.max(
    TOP.first,
    ...[...bodies.values()].filter(({ x }) => x < edge).map((body) => body.y + body.height),
  );
  const rowOf = (atFoot: boolean): PlacedCable[] => {
    const list = page.cables.filter((cable) => cable.atFoot === atFoot);
    const wishes = (cable: PageCable): number[] => cable.cores.flatMap((core) => wish(core) ?? []);
    const first = (cable: PageCable): number => Math.min(Infinity, ...wishes(cable));
    const coming = list.filter((cable) => !cable.outgoing);
    // what leaves a room leaves right of the cable that feeds it there
    const rank = (cable: PageCable): number =>
      cable.outgoing && !atFoot
        ? Math.max(
            first(cable),
            ...coming
              .filter((other) => first(other) <= first(cable) && Math.max(...wishes(other)) >= first(cable))
              .map((other) => Math.max(...wishes(other)) + 1),
          )
        : first(cable);
    list.sort((a, b) => rank(a) - rank(b) || Number(a.outgoing) - Number(b.outgoing) || (a.id < b.id ? -1 : 1));
    let free = m(8);
    return list.map((cable): PlacedCable => {
      const pitch = atFoot ? FOOT_CORE : CORE_PITCH;
      const stubs: Stub[] = [];
      const words = wordsWidth(cable);
      const order = { L: 0, N: 1, E: 2 };
      const cores = [...cable.cores].sort((a, b) => order[a.core] - order[b.core] || (wish(a) ?? 0) - (wish(b) ?? 0));
      // neutral and earth of a way pass beside its device, not through it
      const device = atFoot ? bodies.get(cable.cores.find((core) => core.core === 'L')?.here[0] ?? '') : undefined;
      for (const core of cores) {
        const beside = device && wish(core) === undefined ? device.x + device.width + m(1) : 0;
        const least = Math.max(beside, stubs.length > 0 ? stubs.at(-1)!.x + pitch : free + m(1));
        const wanted = wish(core);
        const x = Math.max(least, wanted === undefined ? least : Math.round(wanted / MODULE) * MODULE);
        stubs.push({ core, x, y: atFoot ? lowest + FOOT.cores : TOP.cores, side: atFoot ? 'up' : 'down' });
      }
      const left = stubs[0]!.x - m(2);
      const right = Math.max(stubs.at(-1)!.x + m(2), atFoot ? 0 : left + words);
      free = Math.max(right, left + (atFoot ? 0 : words)) + (atFoot ? 0 : CABLE_GAP);
      return { cable, stubs, left, right, y: atFoot ? lowest + FOOT.brace : TOP.brace };
    });
  };
  return [...rowOf(false), ...rowOf(true)];
}

/** Bars lie under their conductors: each terminal stands where its core comes down, the others beyond the ends. */
export function barBodies(
  page: Page,
  positions: ReadonlyMap<string, Position>,
  bodies: ReadonlyMap<string, Body>,
  cables: readonly PlacedCable[],
  marks: ReadonlyMap<string, readonly string[]>,
): Map<string, Body> {
  const stubAt = new Map(cables.flatMap(({ stubs }) => stubs.map((stub) => [stub.core.run, stub] as const)));
  const all = new Map(bodies);
  for (const part of page.parts)
    if (isLongBar(part.kind))
      all.set(
        part.id,
        barBody(
          part as Part & { kind: BarKind },
          page,
          positions.get(part.id)!,
          bodies,
          stubAt,
          marks.get(part.id) ?? [],
        ),
      );
  return all;
}

function barBody(
  part: Part & { kind: BarKind },
  page: Page,
  at: Position,
  bodies: ReadonlyMap<string, Body>,
  stubAt: ReadonlyMap<string, Stub>,
  used: readonly string[],
): Body {
  const axis = at.y + BAR_AXIS;
  const wanted: { mark: string; x: number; side: Side }[] = [];
  const beyond: string[] = [];
  const later: string[] = [];
  const kinds = new Map(page.parts.map((other) => [other.id, other.kind]));
  const note = (mark: string, x: number | undefined, y: number) => {
    if (wanted.some((w) => w.mark === mark) || beyond.includes(mark)) return;
    if (x === undefined || x < at.x) beyond.push(mark);
    else wanted.push({ mark, x: Math.round(x / MODULE) * MODULE, side: y > axis ? 'down' : 'up' });
  };
  for (const wire of page.inner)
    for (const [own, far] of [
      [wire.from, wire.to],
      [wire.to, wire.from],
    ] as const) {
      if (own[0] !== part.id) continue;
      const t = bodies.get(far[0])?.terminals.find((terminal) => terminal.mark === far[1]);
      // what stands on the board hangs straight from the bar; a load of the same place is led to its end
      if (t && ON_BOARD.has(kinds.get(far[0])!)) note(own[1], t.x, t.y);
      else if (t) later.push(own[1]);
      else note(own[1], undefined, 0);
    }
  for (const cable of page.cables)
    for (const core of cable.cores) {
      const stub = stubAt.get(core.run);
      if (core.here[0] === part.id && stub) note(core.here[1], stub.x, stub.y);
    }
  wanted.sort((a, b) => a.x - b.x || Number(a.mark) - Number(b.mark));
  const terminals: SceneTerminal[] = [];
  let least = at.x + 2 * MODULE + beyond.length * 3 * MODULE;
  for (const { mark, x, side } of wanted) {
    const place = Math.max(x, least);
    terminals.push({ mark, x: place, y: axis, side });
    least = place + 2 * MODULE;
  }
  // what feeds the bar comes to its left end, the rest beside it
  beyond
    .sort((a, b) => Number(a) - Number(b))
    .forEach((mark, i) =>
      terminals.push(
        i === 0
          ? { mark, x: at.x, y: axis, side: 'left' }
          : { mark, x: at.x - MODULE + i * 3 * MODULE, y: axis, side: 'up' },
      ),
    );
  for (const mark of [...later.sort((a, b) => Number(a) - Number(b)), ...used])
    if (!terminals.some((t) => t.mark === mark))
      terminals.push({ mark, x: (least += 3 * MODULE), y: axis, side: 'up' });
  let right = Math.max(at.x + 8 * MODULE, ...terminals.map((t) => t.x)) + 3 * MODULE;
  // a terminal without a wire stands in no core's way
  const passing = new Set([...stubAt.values()].map(({ x }) => x));
  while (passing.has(right)) right += MODULE;
  let free = 1;
  while (terminals.some((t) => t.mark === String(free))) free++;
  terminals.push({ mark: String(free), x: right, y: axis, side: 'up' });
  terminals.sort((a, b) => Number(a.mark) - Number(b.mark));
  return { x: at.x, y: at.y, width: right + 2 * MODULE - at.x, height: BAR_HEIGHT, turn: 0, terminals };
}
