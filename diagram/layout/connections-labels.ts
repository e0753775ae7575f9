import { byCode, type Part } from '../document/schema';
import { symbolFor } from '../symbols';
import { boxesAlong, stretchesOfPath } from '../symbols/flatten';
import { turnedPoint } from '../symbols/turn';
import type { PlacedCable } from './connections-ends';
import type { Page } from './connections-page';
import { isLongBar } from './connections-page-state';
import type { Body } from './ends';
import { Ground, blockTexts, placeLabel, type Anchor, type Label } from './labels';
import { BODY, SMALL, breakLines } from './lettering';
import { printedRef } from './overview-labels';
import { m } from './overview-metrics';
import type { OverviewPlan } from './overview-plan';
import type { Box } from './route-grid';
import type { Point, SceneFrame, SceneText } from './scene';
import { textBox } from './text-box';
import { ratingLines } from './wording';

/** Designations, terminal marks and the names of cores of a page, each clear of all else. */

export interface PageTexts {
  parts: Map<string, SceneText[]>;
  wires: Map<string, SceneText[]>;
  loose: SceneText[];
  reach: Point[];
}

const RING = 150;
/** Ratings are broken to lines of this width. */
const LINE = 2100;
const at = (x: number, y: number, horizontal: Anchor['horizontal'], vertical: Anchor['vertical']): Anchor => ({
  x,
  y,
  horizontal,
  vertical,
});

/** Beside a terminal, at its corners first, then a little further off: symbols and loops leave different ground free. */
function markPlaces(t: { x: number; y: number }): Anchor[] {
  const near = RING + 90;
  const corners = [60, 130, 200, 280].flatMap((dy) =>
    [near, near + 100].flatMap((far) => [
      at(t.x + far, t.y - dy, 'start', 'bottom'),
      at(t.x - far, t.y - dy, 'end', 'bottom'),
      at(t.x + far, t.y + dy, 'start', 'top'),
      at(t.x - far, t.y + dy, 'end', 'top'),
    ]),
  );
  return [
    ...corners.slice(0, 4),
    at(t.x + near, t.y, 'start', 'middle'),
    at(t.x - near, t.y, 'end', 'middle'),
    at(t.x, t.y - near, 'middle', 'bottom'),
    at(t.x, t.y + near, 'middle', 'top'),
    ...corners.slice(4),
  ];
}

function namePlaces(body: Body, round: boolean): Anchor[] {
  const right = body.x + body.width + 150;
  const left = body.x - 150;
  const middle = body.x + body.width / 2;
  const beside = [
    at(right, body.y + 100, 'start', 'top'),
    at(left, body.y + 100, 'end', 'top'),
    at(right, body.y + body.height - 100, 'start', 'bottom'),
    at(left, body.y + body.height - 100, 'end', 'bottom'),
  ];
  const over = [at(body.x, body.y - 120, 'start', 'bottom'), at(middle, body.y + body.height + 150, 'middle', 'top')];
  return round ? [at(left, body.y + body.height / 2, 'end', 'middle'), ...beside, ...over] : [...beside, ...over];
}

/** What a symbol's strokes and its own lettering cover, where it stands. */
function strokesOf(part: Part, body: Body): Box[] {
  const symbol = symbolFor(part, 'connections', body.terminals.length);
  const place = (x: number, y: number): Point => {
    const at = turnedPoint(x, y, symbol, body.turn);
    return { x: body.x + at.x, y: body.y + at.y };
  };
  return [
    ...symbol.strokes
      .flatMap(({ d }) => stretchesOfPath(d))
      .flatMap(({ x1, y1, x2, y2 }) => {
        const [a, b] = [place(x1, y1), place(x2, y2)];
        return boxesAlong({ x1: a.x, y1: a.y, x2: b.x, y2: b.y }, 90, 12);
      }),
    ...(symbol.texts ?? []).map((text) => textBox({ ...text, ...place(text.x, text.y) })),
  ];
}

/** Places all lettering of a page. */
export function letterPage(
  page: Page,
  plan: OverviewPlan,
  bodies: ReadonlyMap<string, Body>,
  cables: readonly PlacedCable[],
  frames: readonly SceneFrame[],
  routes: ReadonlyMap<string, Point[]>,
): PageTexts {
  const ground = new Ground();
  // nothing is written outside the page
  const lowest = Math.max(...[...bodies.values()].map(({ y, height }) => y + height), ...cables.map(({ y }) => y));
  ground.add({ x: -m(40), y: -m(10), width: m(40) + 300, height: lowest + m(50) });
  const inside: { box: Body; id: string }[] = [];
  for (const [id, body] of bodies) {
    const part = plan.graph.byId.get(id)!;
    // marks are written inside a device's box beside its terminals, so only its glyph is taken ground there
    if (isLongBar(part.kind))
      ground.add({ x: body.x, y: body.y + body.height / 2 - 72, width: body.width, height: 144 });
    else {
      inside.push({ box: body, id });
      for (const box of strokesOf(part, body)) ground.add(box);
    }
    for (const t of body.terminals) ground.add({ x: t.x - RING, y: t.y - RING, width: 2 * RING, height: 2 * RING });
  }
  for (const points of routes.values()) ground.addPath(points, 100);
  for (const { x, y, width: w, height: h, kind, texts } of frames) {
    if (kind === 'switchboard')
      ground.addPath(
        [
          { x, y },
          { x: x + w, y },
          { x: x + w, y: y + h },
          { x, y: y + h },
          { x, y },
        ],
        20,
      );
    else ground.add({ x, y, width: w, height: h });
    if (kind === 'brace') for (const text of texts) ground.add(textBox(text));
  }
  const texts: PageTexts = { parts: new Map(), wires: new Map(), loose: [], reach: [] };
  const keep = (map: Map<string, SceneText[]>, label: Label): void => {
    const block = placeLabel(ground, label);
    if (!block) return;
    map.set(label.owner, [...(map.get(label.owner) ?? []), ...blockTexts(block)]);
    texts.reach.push({ x: block.x + block.width, y: block.y + block.height });
  };
  // names of cores at their stubs
  for (const { stubs, cable } of cables)
    for (const { core, x, y } of stubs) {
      const mark = core.core === 'E' ? 'PE' : core.core;
      const lines = [
        [{ text: mark, bold: true }],
        ...(core.home && !cable.atFoot
          ? [[{ text: core.core === 'L' || cable.outgoing ? core.home : `to ${core.home}`, tone: 'grey' as const }]]
          : []),
      ];
      keep(texts.wires, {
        owner: core.run,
        size: SMALL,
        lines,
        places: cable.atFoot
          ? [at(x + 130, y - 100, 'start', 'bottom'), at(x - 130, y - 100, 'end', 'bottom')]
          : [at(x + 200, y + 100, 'start', 'top'), at(x - 200, y + 100, 'end', 'top')],
        optional: cable.atFoot,
      });
    }
  // marks of terminals: inside the boxes
  for (const part of page.parts)
    for (const t of bodies.get(part.id)!.terminals) {
      const wired =
        !isLongBar(part.kind) ||
        page.inner.some((w) => isAt(w.from, part.id, t.mark) || isAt(w.to, part.id, t.mark)) ||
        page.cables.some((c) => c.cores.some((core) => isAt(core.here, part.id, t.mark)));
      if (wired)
        keep(texts.parts, {
          owner: part.id,
          size: SMALL,
          lines: [[{ text: t.mark, tone: 'grey' }]],
          places: markPlaces(t),
          optional: true,
          clear: 30,
        });
    }
  for (const { box } of inside) ground.add(box);
  for (const frame of frames) if (frame.kind === 'switchboard') nameBoard(ground, frame);
  // designations and ratings: outside
  for (const part of [...page.parts].sort((a, b) => byCode(a.id, b.id))) {
    const body = bodies.get(part.id)!;
    const ref = printedRef(part);
    const lines = [
      ...(ref && part.kind !== 'joint' ? [[{ text: ref, bold: true }]] : []),
      ...ratingLines(part)
        .slice(0, 2)
        .flatMap((text) => breakLines(text, BODY, LINE))
        .map((text) => [{ text, tone: 'grey' as const }]),
    ];
    if (part.kind === 'joint' || lines.length === 0) continue;
    const round = part.kind === 'lamp' || part.kind === 'fan' || part.kind === 'appliance';
    const bar = isLongBar(part.kind);
    const kind = part.kind === 'neutral-bar' ? 'N' : part.kind === 'earth-bar' ? 'PE' : 'L';
    const barLine = [
      [
        ...(part.ref ? [{ text: part.ref, bold: true }] : []),
        { text: kind, bold: true },
        ...ratingLines(part).map((text) => ({ text, tone: 'grey' as const })),
      ],
    ];
    const barPlaces = [
      at(body.x - 120, body.y + body.height / 2, 'end', 'middle'),
      at(body.x, body.y + body.height / 2 - 250, 'start', 'bottom'),
      at(body.x + body.width + 120, body.y + body.height / 2, 'start', 'middle'),
    ];
    keep(texts.parts, {
      owner: part.id,
      size: BODY,
      lines: bar ? barLine : lines,
      places: bar ? barPlaces : namePlaces(body, round),
    });
  }
  return texts;
}

/** The name of a switchboard stands at a corner of its frame, wherever there is room. */
function nameBoard(ground: Ground, frame: SceneFrame): void {
  const [name] = frame.texts;
  if (!name) return;
  const { x, y, width, height } = frame;
  const places = [
    at(x + 150, y - 100, 'start', 'bottom'),
    at(x + 150, y + 150, 'start', 'top'),
    at(x + width - 150, y - 100, 'end', 'bottom'),
    at(x + width - 150, y + 150, 'end', 'top'),
    at(x + 150, y + height + 150, 'start', 'top'),
    at(x + width - 150, y + height + 150, 'end', 'top'),
  ];
  const block = placeLabel(ground, { owner: frame.id, size: BODY, lines: [[{ text: name.text, bold: true }]], places });
  frame.texts = block ? blockTexts(block) : [];
}

const isAt = (end: readonly [string, string], part: string, mark: string): boolean =>
  end[0] === part && end[1] === mark;
