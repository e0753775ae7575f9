import { byCode, type Position } from '../document/schema';
import { symbolFor } from '../symbols';
import { turnedSize } from '../symbols/turn';
import { MODULE } from '../symbols/types';
import { Ground } from './labels';
import { otherEnd } from './overview-graph';
import { LEFT, ROOM, WAY_PITCH, m } from './overview-metrics';
import type { OverviewPlan } from './overview-plan';
import { around } from './positions';
import type { Box } from './route-grid';

/**
 * The position of every part of the overview. Stored positions stand. What has none yet takes its place beside what has:
 * a device under the one that feeds it, a way beside the last one of its bar, a load at the end of its room, a new room
 * right of the others.
 */
export function overviewPositions(
  plan: OverviewPlan,
  stored: Readonly<Record<string, Position>>,
): Map<string, Position> {
  const kept = [...plan.positions.keys()].filter((id) => stored[id]);
  if (kept.length === 0) return plan.positions;
  if (kept.length === plan.positions.size) return new Map(kept.map((id) => [id, stored[id]!]));
  return new Filler(plan, stored).run();
}

interface Span {
  left: number;
  right: number;
}

/** Searched to the right and left of a wish, in steps. */
const STEPS = 80;

class Filler {
  private readonly positions = new Map<string, Position>();
  private readonly ground = new Ground();
  private readonly rooms = new Map<string, Span>();
  private readonly heads: ReadonlySet<string>;

  constructor(
    private readonly plan: OverviewPlan,
    stored: Readonly<Record<string, Position>>,
  ) {
    this.heads = new Set(plan.content.hanging.flatMap((item) => item.head?.part.id ?? []));
    for (const id of [...plan.positions.keys()].sort(byCode)) if (stored[id]) this.put(id, stored[id]!);
  }

  run(): Map<string, Position> {
    // in rounds, from above: first what hangs on a placed part, then what hangs on that
    const wish = (id: string): Position => this.plan.positions.get(id)!;
    let waiting = [...this.plan.positions.keys()]
      .filter((id) => !this.positions.has(id))
      .sort((a, b) => wish(a).y - wish(b).y || wish(a).x - wish(b).x || byCode(a, b));
    while (waiting.length > 0) {
      const next = waiting.find((id) => this.neighbour(id) !== null) ?? waiting[0]!;
      this.put(next, this.find(next));
      waiting = waiting.filter((id) => id !== next);
    }
    return this.positions;
  }

  private box(id: string, at: Position): Box {
    return { x: at.x, y: at.y, ...turnedSize(symbolFor(this.plan.graph.byId.get(id)!, 'overview'), at.turn ?? 0) };
  }

  private put(id: string, at: Position): void {
    this.positions.set(id, at);
    const box = this.box(id, at);
    this.ground.add(box);
    const room = this.plan.roomOf.get(id);
    if (room === undefined) return;
    const span = this.rooms.get(room);
    this.rooms.set(room, {
      left: Math.min(span?.left ?? Infinity, box.x),
      right: Math.max(span?.right ?? -Infinity, box.x + box.width),
    });
  }

  private isFree(id: string, at: Position): boolean {
    return this.ground.overlap(this.box(id, at), MODULE - 1) === 0;
  }

  private neighbour(id: string): string | null {
    const near = (this.plan.graph.at.get(id) ?? []).map((run) => otherEnd(run, id)[0]);
    return near.filter((other) => other !== id && this.positions.has(other)).sort(byCode)[0] ?? null;
  }

  /** Where the plan has a part, seen from another that is placed. */
  private seenFrom(id: string, other: string | null): Position {
    const wish = this.plan.positions.get(id)!;
    if (other === null) return wish;
    const [actual, meant] = [this.positions.get(other)!, this.plan.positions.get(other)!];
    return { ...wish, x: wish.x + actual.x - meant.x, y: wish.y + actual.y - meant.y };
  }

  private zone(id: string): 'room' | 'foot' | 'lane' | 'column' {
    if (this.plan.roomOf.has(id)) return 'room';
    if (this.plan.backupBoard.has(id)) return 'foot';
    return this.plan.lane.has(id) ? 'lane' : 'column';
  }

  /** A wish by the nearest placed part of the same band; a band that is empty lies where the one above it puts it. */
  private wish(id: string): Position {
    const zone = this.zone(id);
    const near = this.neighbour(id);
    if (near !== null && (this.zone(near) === zone || (zone === 'room' && this.heads.has(near))))
      return this.seenFrom(id, near);
    const planned = this.plan.positions.get(id)!;
    const distance = (other: string): number =>
      Math.abs(this.plan.positions.get(other)!.x - planned.x) + Math.abs(this.plan.positions.get(other)!.y - planned.y);
    const mates = [...this.positions.keys()]
      .filter((other) => this.zone(other) === zone)
      .sort((a, b) => distance(a) - distance(b) || byCode(a, b));
    if (mates[0] !== undefined) return this.seenFrom(id, mates[0]);
    const above = zone === 'foot' ? 'room' : 'column';
    return {
      ...planned,
      y: planned.y + (this.shiftY([...this.positions.keys()].filter((other) => this.zone(other) === above)) ?? 0),
    };
  }

  private find(id: string): Position {
    const room = this.plan.roomOf.get(id);
    const wanted = this.wish(id);
    const wish = { ...wanted, x: Math.max(LEFT, wanted.x), y: Math.max(0, wanted.y) };
    if (room !== undefined) return this.inRoom(id, room, wish) ?? this.anywhere(id, wish);
    if (this.heads.has(id))
      for (let i = 0; i < STEPS; i++)
        for (const side of [1, -1]) {
          const at = { ...wish, x: wish.x + side * i * WAY_PITCH };
          // a way needs the room of its cable data beside it, not only of its symbol
          if (this.ground.overlap({ ...this.box(id, at), x: at.x - m(1), width: WAY_PITCH - m(2) }, 0) === 0) return at;
        }
    return this.anywhere(id, wish);
  }

  private anywhere(id: string, wish: Position): Position {
    for (const at of around(wish)) if (at.x >= 0 && at.y >= 0 && this.isFree(id, at)) return at;
    return wish;
  }

  /** The commonest shift of a set of placed parts against the plan, downwards. */
  private shiftY(ids: Iterable<string>): number | null {
    const tally = new Map<number, number>();
    for (const id of ids) {
      const actual = this.positions.get(id);
      const planned = this.plan.positions.get(id);
      if (actual && planned) tally.set(actual.y - planned.y, (tally.get(actual.y - planned.y) ?? 0) + 1);
    }
    return [...tally].sort((a, b) => b[1] - a[1] || a[0] - b[0])[0]?.[0] ?? null;
  }

  private inRoom(id: string, room: string, wish: Position): Position | null {
    const planned = this.plan.positions.get(id)!;
    const mates = [...this.plan.roomOf]
      .filter(([other, place]) => place === room && this.positions.has(other))
      .map(([other]) => other);
    const y = planned.y + (this.shiftY(mates) ?? this.shiftY(this.plan.roomOf.keys()) ?? wish.y - planned.y);
    if (mates.length === 0) return this.newRoom(id, room, { ...wish, y });
    const own = this.rooms.get(room)!;
    const others = [...this.rooms].filter(([place]) => place !== room).map(([, span]) => span);
    const gap = 2 * ROOM.side + ROOM.gap;
    const most = Math.min(...others.filter((span) => span.left >= own.right).map((span) => span.left - gap), Infinity);
    const least = Math.max(
      ...others.filter((span) => span.right <= own.left).map((span) => span.right + gap),
      -Infinity,
    );
    const width = this.box(id, planned).width;
    const nearest = mates.sort(
      (a, b) =>
        Math.abs(this.plan.positions.get(a)!.x - planned.x) - Math.abs(this.plan.positions.get(b)!.x - planned.x) ||
        byCode(a, b),
    )[0]!;
    const x = this.seenFrom(id, nearest).x;
    // in its own row, then in a second and third row below
    for (const drop of [0, m(8), m(16)])
      for (let i = 0; i < STEPS; i++)
        for (const side of [1, -1]) {
          const at = { ...planned, x: x + side * i * MODULE, y: y + drop };
          if (at.x < least || at.x + width > most) continue;
          // loads carry their words below them: room is kept for those as well
          const box = this.box(id, at);
          if (
            this.ground.overlap(
              { ...box, x: box.x - MODULE / 2, width: box.width + MODULE, height: box.height + (drop > 0 ? m(4) : 0) },
              MODULE - 1,
            ) === 0
          )
            return at;
        }
    return null;
  }

  /** The first part of a room: under its way where no other room stands, else right of them all. */
  private newRoom(id: string, room: string, wish: Position): Position | null {
    const span = this.plan.rooms.get(room);
    if (!span) return null;
    const offset = this.plan.positions.get(id)!.x - span.x;
    const left = wish.x - offset;
    const clash = [...this.rooms.values()].some(
      (other) => other.left - ROOM.side - ROOM.gap < left + span.width && left < other.right + ROOM.side + ROOM.gap,
    );
    const start = clash
      ? Math.ceil((Math.max(...[...this.rooms.values()].map((other) => other.right)) + ROOM.side + ROOM.gap) / MODULE) *
        MODULE
      : left;
    const at = { ...wish, x: start + offset };
    return this.isFree(id, at) ? at : null;
  }
}
