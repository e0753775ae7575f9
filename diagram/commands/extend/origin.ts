import type { End, Kind } from '../../document/schema';
import { RCD_RATINGS, SERVICE_RATINGS, ratingFor } from '../../survey/drafting/assumptions';
import { BOARD } from '../../survey/drafting/house';
import { mainSensitivityA } from '../../survey/drafting/plan-home';
import { Strokes } from './drawing';
import type { At, Count, Recipe, Suggestion, Value } from './types';

/** From the service line to the bars, in the order in which current arrives. */

const OUT: Partial<Record<Kind, string>> = {
  supply: 'L',
  fuse: '2',
  meter: '4',
  isolator: '2',
  rcd: '2',
  rcbo: '2',
  mcb: '2',
  changeover: '2',
  inverter: 'out.L',
};

/** The terminal is where a device of the origin hands the line on. */
const isOutgoing = (at: At): boolean => OUT[at.part.kind] === at.mark && at.conductor === 'L' && !at.switched;

/** What stands before the terminal already, so that nothing is offered twice. */
function before(at: At): Set<Kind> {
  const parts = new Map(at.doc.parts.map((part) => [part.id, part]));
  const kinds = new Set<Kind>();
  for (let end: End | null = at.end; end; end = at.walk.get(`${end[0]} ${end[1]}`)?.from ?? null) {
    const part = parts.get(end[0]);
    if (part) kinds.add(part.kind);
  }
  return kinds;
}

function ratingBefore(at: At): number {
  const parts = new Map(at.doc.parts.map((part) => [part.id, part]));
  for (let end: End | null = at.end; end; end = at.walk.get(`${end[0]} ${end[1]}`)?.from ?? null) {
    const part = parts.get(end[0]);
    if (part && 'rating' in part && part.rating) return part.rating;
  }
  return SERVICE_RATINGS[0];
}

interface Line {
  id: string;
  what: string;
  detail: string;
  reason: string;
  rank: number;
  assembly?: boolean;
  values?: readonly Value[];
  counts?: readonly Count[];
  draw(s: Strokes, rating: number): End;
}

const single = (line: Line, at: At): Suggestion => {
  const values = line.values ?? [];
  return {
    ...line,
    assembly: line.assembly ?? false,
    values,
    counts: line.counts ?? [],
    place(choice) {
      const s = new Strokes(at);
      const next = line.draw(
        s,
        choice.rating ?? values.find((value) => value.id === 'rating')?.value ?? ratingBefore(at),
      );
      return s.command(`Place ${line.what}`, next);
    },
  };
};

const rating = (value: number): Value => ({ id: 'rating', label: 'rating', unit: 'A', value, least: 1, most: 125 });
const inBoard = { board: BOARD };

/** Joins both conductors through a two-pole device. */
function throughBoth(s: Strokes, id: string): End {
  s.sketch.wire(s.tap(s.at.end), [id, '1'], 'line');
  const neutral = s.neutral();
  if (neutral) s.sketch.wire(neutral, [id, '3'], 'neutral');
  return [id, '2'];
}

/** A line bar and a neutral bar behind a pair of terminals. */
function bars(s: Strokes, line: End, neutral: End | null, amps: number): End {
  const lineBar = s.part({ kind: 'line-bar', ...inBoard, rating: amps }, null);
  s.sketch.wire(line, s.sketch.nextOn(lineBar), 'line');
  const neutralBar = s.part({ kind: 'neutral-bar', ...inBoard }, s.sketch.nextRef('X'));
  if (neutral) s.sketch.wire(neutral, s.sketch.nextOn(neutralBar), 'neutral');
  return s.sketch.nextOn(lineBar);
}

function residual(s: Strokes, sensitivity: number, delay: 'none' | 'S', label: string): string {
  const { draft } = s.at.practice;
  return s.part({
    kind: 'rcd',
    label,
    ...inBoard,
    rating: ratingFor(ratingBefore(s.at), RCD_RATINGS),
    sensitivity,
    type: draft.rcdType,
    delay,
  });
}

export const origin: Recipe = function* (at) {
  if (!isOutgoing(at)) return;
  const passed = before(at);
  const amps = ratingBefore(at);
  const lines: Line[] = [];
  if (at.part.kind === 'supply')
    lines.push({
      id: 'fuse',
      what: 'service fuse',
      detail: `${amps} A gG`,
      reason: 'the first thing behind the service line',
      rank: 1,
      values: [rating(amps)],
      draw: (s, value) => {
        const id = s.part({ kind: 'fuse', rating: value, standard: 'gG' });
        s.sketch.wire(s.tap(at.end), [id, '1'], 'line');
        return [id, '2'];
      },
    });
  if ((at.part.kind === 'fuse' || at.part.kind === 'supply') && !passed.has('meter'))
    lines.push({
      id: 'meter',
      what: 'meter',
      detail: `${amps} A`,
      reason: 'the supplier counts before the main switch',
      rank: at.part.kind === 'fuse' ? 1 : 2,
      draw: (s, value) => {
        const id = s.part({ kind: 'meter', rating: value });
        s.sketch.wire(s.tap(at.end), [id, '1'], 'line');
        const neutral = s.neutral();
        if (neutral) s.sketch.wire(neutral, [id, '2'], 'neutral');
        return [id, '4'];
      },
    });
  if (!passed.has('isolator') && ['meter', 'fuse'].includes(at.part.kind))
    lines.push({
      id: 'main switch',
      what: 'main switch',
      detail: `${amps} A, two poles`,
      reason: 'one handle that makes the whole home dead',
      rank: at.part.kind === 'meter' ? 1 : 3,
      values: [rating(amps)],
      draw: (s, value) => {
        const id = s.part({
          kind: 'isolator',
          label: 'Main switch',
          ...inBoard,
          poles: 2,
          rating: value,
          state: 'closed',
        });
        return throughBoth(s, id);
      },
    });
  if (passed.has('isolator') || at.backup || passed.has('rcd')) lines.push(...distribution(at, passed, amps));
  for (const line of lines) yield single(line, at);
};

function distribution(at: At, passed: ReadonlySet<Kind>, amps: number): Line[] {
  const lines: Line[] = [];
  const tt = at.doc.supply.system === 'TT';
  const behindBreaker = passed.has('mcb') && !at.backup;
  if (behindBreaker) return [];
  if (!passed.has('rcd') || tt)
    lines.push({
      id: 'rcd group',
      what: 'rcd 30 mA with its bars',
      detail: `${ratingFor(amps, RCD_RATINGS)} A, line bar, neutral bar`,
      reason: 'each group of ways keeps its own neutral bar',
      rank: 2,
      assembly: true,
      draw: (s) => {
        const id = residual(s, 0.03, 'none', at.backup ? 'Backup ways' : 'Mains ways');
        return bars(s, throughBoth(s, id), [id, '4'], ratingFor(amps, RCD_RATINGS));
      },
    });
  if (!passed.has('rcd') && !at.backup) {
    const sensitivity = mainSensitivityA(at.doc.supply, at.practice.touchVolts.value);
    lines.push({
      id: 'main rcd',
      what: 'main rcd, delayed',
      detail: `${1000 * sensitivity} mA S`,
      reason: tt ? 'on TT an rcd clears what the electrode cannot' : 'before other rcds it waits for them',
      rank: tt ? 1 : 6,
      draw: (s) => throughBoth(s, residual(s, sensitivity, sensitivity >= 0.1 ? 'S' : 'none', 'Main rcd')),
    });
  }
  lines.push({
    id: 'bars',
    what: 'line bar and neutral bar',
    detail: `${amps} A`,
    reason: 'several devices hang from one bar',
    rank: passed.has('rcd') ? 1 : 3,
    assembly: true,
    draw: (s) => {
      const neutral = s.neutral();
      return bars(s, s.tap(at.end), neutral, amps);
    },
  });
  if (!at.doc.parts.some((part) => part.kind === 'spd'))
    lines.push({
      id: 'spd',
      what: 'surge arrester',
      detail: 'class 2',
      reason: 'at the origin, its earth lead short',
      rank: 7,
      draw: (s) => {
        const id = s.part({ kind: 'spd', ...inBoard, class: 2 });
        s.sketch.wire(s.tap(at.end), [id, 'L'], 'line');
        const neutral = s.neutral();
        if (neutral) s.sketch.wire(neutral, [id, 'N'], 'neutral');
        s.sketch.wire([id, 'E'], s.earth(), 'earth');
        return at.end;
      },
    });
  return lines;
}
