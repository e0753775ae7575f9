import { isBar } from '../document/kinds';
import type { Installation, Part } from '../document/schema';
import { BAR_AXIS } from '../symbols/bar';
import type { Body } from './ends';
import type { Anchor, Label, Span } from './labels';
import { BODY, SMALL } from './lettering';
import type { OverviewPlan } from './overview-plan';
import { ratingLines, supplyText } from './wording';

/** What is written beside each part of the overview, and where it may stand. */

/** An id that reads as a designation is printed as one; an opaque id is not. */
export const printedRef = (part: Part): string =>
  part.ref ?? (/^[A-Z]{1,3}\d{0,4}(\.\d{1,2})?$/.test(part.id) ? part.id : '');

const at = (x: number, y: number, horizontal: Anchor['horizontal'], vertical: Anchor['vertical']): Anchor => ({
  x: Math.round(x),
  y: Math.round(y),
  horizontal,
  vertical,
});

const beside = (axis: number, body: Body, reach: number, left = false): Anchor[] => {
  const y = body.y + body.height / 2;
  const right = [at(axis + reach, y, 'start', 'middle'), at(body.x + body.width + 60, y, 'start', 'middle')];
  const lefts = [at(axis - reach, y, 'end', 'middle'), at(body.x - 60, y, 'end', 'middle')];
  return left ? [...lefts, ...right] : [...right, ...lefts];
};

const aboveOrBelow = (axis: number, body: Body, reach: number): Anchor[] => {
  const x = body.x + body.width / 2;
  return [
    at(x, axis - reach, 'middle', 'bottom'),
    at(x, body.y - 60, 'middle', 'bottom'),
    at(x, body.y + body.height + 100, 'middle', 'top'),
  ];
};

const below = (body: Body): Anchor[] => {
  const x = body.x + body.width / 2;
  return [
    at(x, body.y + body.height + 250, 'middle', 'top'),
    at(body.x + body.width + 100, body.y + body.height / 2, 'start', 'middle'),
    at(body.x - 100, body.y + body.height / 2, 'end', 'middle'),
  ];
};

const words = (...spans: (Span | null)[]): Span[] =>
  spans.filter((span): span is Span => span !== null && span.text !== '');

function barLabel(doc: Installation, plan: OverviewPlan, part: Part, body: Body): Label {
  const ref = printedRef(part);
  const lines: Span[] = [];
  const used = new Set(
    doc.wires
      .flatMap((wire) => [wire.from, wire.to])
      .filter(([id]) => id === part.id)
      .map(([, mark]) => mark),
  ).size;
  if (part.kind === 'line-bar') {
    const name = plan.backupBoard.has(part.id) ? 'BACKUP BAR' : 'LINE BAR';
    lines.push(
      ...words(
        part.ref ? { text: part.ref, bold: true } : null,
        { text: name, tone: 'grey' },
        { text: ratingLines(part)[0] ?? '', tone: 'grey' },
      ),
    );
  } else {
    const count = 'count' in part && part.count ? `${used} of ${part.count}` : `${used} used`;
    const behind = plan.graph.neutralFrom.get(part.id);
    const device = behind ? plan.graph.byId.get(behind) : undefined;
    const named = device ? printedRef(device) : '';
    lines.push(
      ...words(
        { text: ref, bold: true },
        { text: part.kind === 'neutral-bar' ? 'N' : 'PE', bold: true },
        {
          text: [named && part.kind === 'neutral-bar' ? `behind ${named},` : '', count].filter(Boolean).join(' '),
          tone: 'grey',
        },
      ),
    );
  }
  const left = part.kind === 'line-bar' && plan.backupBoard.has(part.id);
  const axis = body.y + BAR_AXIS;
  const alongBar = Array.from({ length: Math.min(12, Math.ceil(body.width / 1500)) }, (_, i) => body.x + 1500 * i);
  return {
    owner: part.id,
    lines: [lines],
    size: BODY,
    places: left
      ? [at(body.x + body.width, axis + 200, 'end', 'top'), at(body.x, axis + 200, 'start', 'top')]
      : [
          ...alongBar.map((x) => at(x, axis - 180, 'start', 'bottom')),
          at(body.x + body.width, axis - 180, 'end', 'bottom'),
          at(body.x - 120, axis, 'end', 'middle'),
          at(body.x, axis + 200, 'start', 'top'),
        ],
  };
}

/** The label of a part, or null where it carries none. */
export function partLabel(doc: Installation, plan: OverviewPlan, part: Part, body: Body): Label | null {
  const ref: Span | null = printedRef(part) ? { text: printedRef(part), bold: true } : null;
  const ratings = ratingLines(part);
  const label = (lines: Span[][], places: Anchor[], size: number = BODY): Label => ({
    owner: part.id,
    lines,
    size,
    places,
  });
  const vertical = body.turn % 2 === 0;
  const axisX = body.terminals.find((t) => t.side === 'up' || t.side === 'down')?.x ?? body.x + body.width / 2;
  const axisY = body.terminals.find((t) => t.side === 'left' || t.side === 'right')?.y ?? body.y + body.height / 2;
  const inRoom = plan.roomOf.has(part.id);
  const isWay = plan.ways.some((way) => way.device === part.id);
  switch (part.kind) {
    case 'joint':
      return null;
    case 'line-bar':
    case 'neutral-bar':
    case 'earth-bar':
      return barLabel(doc, plan, part, body);
    case 'supply':
      return label([words({ text: supplyText(doc) })], beside(axisX, body, 300));
    case 'lamp':
    case 'fan':
    case 'socket':
    case 'appliance':
    case 'plug':
      return label(
        [words(ref), words(ratings[0] ? { text: ratings[0] } : null)].filter((line) => line.length > 0),
        below(body),
      );
    case 'electrode':
      return label(
        [words(doc.supply.ra !== undefined ? { text: `RA ${doc.supply.ra} Ω`, tone: 'grey' } : ref)],
        beside(axisX, body, 330),
      );
    case 'bond':
      return label([words({ text: part.to ?? 'bond', tone: 'grey' })], beside(axisX, body, 310));
    case 'inverter': {
      const [first, ...rest] = ratings;
      const lines = [words(ref, first ? { text: first } : null), ...rest.map((text) => words({ text, tone: 'grey' }))];
      return label(lines, [
        at(body.x + body.width / 2, body.y + body.height + 150, 'middle', 'top'),
        at(body.x - 150, body.y + body.height + 150, 'end', 'top'),
        at(body.x - 150, body.y - 60, 'end', 'bottom'),
      ]);
    }
    case 'battery':
      return label(
        [
          words(ref, ratings[0] ? { text: ratings[0] } : null),
          ...ratings.slice(1).map((text) => words({ text, tone: 'grey' as const })),
        ],
        beside(axisX, body, 500),
      );
    case 'meter':
      return label(
        [words(ref, ratings[0] ? { text: ratings[0] } : null)],
        [at(body.x + body.width + 120, body.y + body.height / 2, 'start', 'middle')],
      );
    case 'spd':
      return label(
        [words(ref), words(ratings[0] ? { text: ratings[0], tone: 'grey' } : null)],
        [...beside(axisX, body, 300), at(axisX, body.y + body.height + 120, 'middle', 'top')],
      );
    case 'switch':
    case 'switch-2way':
    case 'switch-cross':
    case 'switch-2pole':
    case 'regulator': {
      if (!ref) return null;
      const dot = { x: axisX, y: body.y + (part.kind === 'regulator' ? body.height / 2 : body.height / 2 + 60) };
      const far = part.kind === 'regulator' ? 330 : 190;
      return label(
        [[{ ...ref, bold: false, tone: 'grey' }]],
        [
          at(
            dot.x + far,
            dot.y + (part.kind === 'regulator' ? 0 : 60),
            'start',
            part.kind === 'regulator' ? 'middle' : 'top',
          ),
          at(dot.x - far, dot.y + 60, 'end', 'top'),
          at(dot.x - far, dot.y - 60, 'end', 'bottom'),
          at(dot.x - far, dot.y + 350, 'end', 'middle'),
        ],
        SMALL,
      );
    }
    default: {
      // a device in line: its blade leans to one side, its words stand on the other
      const leansRight = body.turn === 2 || body.turn === 1;
      const named = part.label && !isWay && !inRoom ? part.label.toLowerCase() : '';
      if (!vertical)
        return label(
          [words(ref, ratings[0] ? { text: ratings[0] } : null), ...ratings.slice(1).map((text) => words({ text }))],
          aboveOrBelow(axisY, body, 280),
        );
      const lines =
        isWay || inRoom
          ? [words(ref), ...ratings.map((text) => words({ text }))]
          : [words(ref, { text: [...ratings, named].filter(Boolean).join(' ') })];
      return label(
        lines.filter((line) => line.length > 0),
        beside(axisX, body, isWay ? 220 : 330, leansRight),
      );
    }
  }
}

/** The parts' own boxes, for the label placer: of a device in line only the side where its blade stands is taken. */
export function takenBy(part: Part, body: Body): { x: number; y: number; width: number; height: number } {
  if (isBar(part.kind) && part.kind !== 'joint')
    return { x: body.x, y: body.y + BAR_AXIS - 72, width: body.width, height: 144 };
  const contact =
    part.kind === 'mcb' ||
    part.kind === 'rcbo' ||
    part.kind === 'isolator' ||
    part.kind === 'rcd' ||
    part.kind === 'fuse';
  if (!contact) return body;
  const lean = part.kind === 'fuse' ? 150 : part.kind === 'rcd' || part.kind === 'rcbo' ? 260 : 170;
  const far = part.kind === 'fuse' ? 350 : 0;
  switch (body.turn) {
    case 0:
      return { x: body.x + far, y: body.y, width: body.width / 2 + lean - far, height: body.height };
    case 2:
      return { x: body.x + body.width / 2 - lean, y: body.y, width: body.width / 2 + lean - far, height: body.height };
    case 1:
      return { x: body.x, y: body.y + far, width: body.width, height: body.height / 2 + lean - far };
    case 3:
      return { x: body.x, y: body.y + body.height / 2 - lean, width: body.width, height: body.height / 2 + lean - far };
  }
}
