import { textWidth } from '../layout/lettering';
import type { Scene, ScenePart } from '../layout/scene';
import { byDesignation } from '../document/names';
import { metresPerUnit, scaleText } from '../document/plan-scale';
import type { FloorPlan, Installation } from '../document/schema';
import { symbolFor } from '../symbols';
import { light } from '../symbols/palette';
import { turnedSize } from '../symbols/turn';
import { sceneGroups } from './draw-scene';
import { borderMarks, frameOf, paperSize, type Area } from './iso-sheet';
import type { Mark, Page } from './primitives';
import { LINE, PAD, drawingArea, type SheetOptions } from './sheet-options';
import { checkLine, strip } from './sheet-strip';
import { TITLE_HEIGHT, titleBlockMarks } from './title-block';

/** The plans of the storeys on paper: the picture, the parts where they hang, and a bar to measure by. */

/** 1/100 mm: height of the capitals of a designation, ground about a symbol */
const LETTERS = 275;
const ROOM = 150;
/** Scales that a rule has, and those between them that are common on plans. */
const SCALES = [10, 20, 25, 50, 75, 100, 125, 150, 200, 250, 500, 1000];
/** m, of the bar: the longest that takes no more than a fifth of the drawing */
const BARS = [0.5, 1, 2, 5, 10, 20];

/** The parts that stand on a plan as a scene: drawn, lettered and explained as on every other sheet. */
function planScene(doc: Installation, plan: FloorPlan): Scene {
  const parts = [...doc.parts].sort(byDesignation).flatMap((part): ScenePart[] => {
    const at = doc.sheet?.plan?.[part.id];
    if (at?.on !== plan.id) return [];
    const symbol = symbolFor(part, 'overview');
    const turn = at.turn ?? 0;
    const { width, height } = turnedSize(symbol, turn);
    const text = part.ref ?? '';
    const name = { x: at.x + width + 2 * ROOM, y: at.y + LETTERS, text, size: LETTERS, bold: true };
    const box = { id: part.id, kind: part.kind, symbol: symbol.id, turn, x: at.x, y: at.y, width, height };
    return [{ ...box, feed: 'mains', terminals: [], texts: text ? [name] : [] }];
  });
  const nothing = { bands: [], frames: [], runs: [], rings: [], dots: [], texts: [] };
  return { face: 'overview', width: plan.width, height: plan.height, parts, ...nothing };
}

const rect = ({ x, y, width, height }: Area): string => `M${x} ${y}H${x + width}V${y + height}H${x}Z`;

/** White grounds, so that symbols and designations read over any picture. */
const grounds = (scene: Scene): Mark[] =>
  scene.parts.flatMap(({ x, y, width, height, texts }) => [
    { kind: 'path' as const, d: rect({ x: x - ROOM, y: y - ROOM, width: width + 2 * ROOM, height: height + 2 * ROOM }), fill: light.paper },
    ...texts.map((name) => ({
      kind: 'path' as const,
      d: rect({ x: name.x - 60, y: name.y - LETTERS - 60, width: textWidth(name.text, LETTERS) + 120, height: LETTERS + 120 }),
      fill: light.paper,
    })),
  ]);

/** How much smaller a plan is drawn: to a scale that a rule has where it was measured, else as large as it fits. */
function factorFor(plan: FloorPlan, area: Area): number {
  const fits = Math.min(1, area.width / plan.width, area.height / plan.height);
  const perUnit = metresPerUnit(plan);
  if (perUnit === null) return fits;
  const whole = perUnit * 100_000;
  const ratio = SCALES.find((scale) => whole / scale <= fits);
  return ratio === undefined ? fits : whole / ratio;
}

/** A bar of whole metres, by which lengths are taken from a print of any size. */
function scaleBar(plan: FloorPlan, factor: number, area: Area): Mark[] {
  const y = area.y + area.height - 200;
  const words = (x: number, text: string): Mark => ({ kind: 'text', x, y: y - 200, text, size: 225, colour: light.ink, anchor: 'start' });
  const perUnit = metresPerUnit(plan);
  if (perUnit === null) return [words(area.x, 'Not measured: take no lengths from it.')];
  const long = (metres: number): number => Math.round((metres / perUnit) * factor);
  const metres = BARS.findLast((each) => long(each) <= area.width / 5) ?? BARS[0]!;
  const [from, to] = [area.x, area.x + long(metres)];
  return [
    { kind: 'path', d: rect({ x: area.x - 100, y: y - 550, width: long(metres) + 1500, height: 700 }), fill: light.paper },
    { kind: 'path', d: `M${from} ${y - 90}V${y + 90}M${from} ${y}H${to}M${to} ${y - 90}V${y + 90}`, stroke: light.ink, width: 35, cap: 'butt' },
    words(from, `${metres} m`),
  ];
}

/** One sheet a storey; `plan` picks one of them. Empty where the drawing has no such plan. */
export function planPages(doc: Installation, options: SheetOptions & { plan?: string }): Page[] {
  const plans = (doc.plans ?? []).filter(({ id }) => options.plan === undefined || id === options.plan);
  const frame = frameOf(options.paper);
  const area = drawingArea(options.paper);
  return plans.map((plan, i): Page => {
    const scene = planScene(doc, plan);
    const factor = factorFor(plan, area);
    const x = Math.round(area.x + (area.width - plan.width * factor) / 2);
    const y = Math.round(area.y + (area.height - plan.height * factor) / 2);
    const scale = scaleText(plan, factor) ?? '-';
    const place = { kind: `Plan, ${plan.name}`, sheet: i + 1, sheets: plans.length, scale };
    return {
      ...paperSize(options.paper),
      groups: [
        { x: 0, y: 0, scale: 1, marks: borderMarks(options.paper) },
        {
          ...{ x, y, scale: factor, marks: grounds(scene) },
          clip: { x: 0, y: 0, width: plan.width, height: plan.height },
          picture: { name: plan.picture, width: plan.width, height: plan.height },
          groups: sceneGroups(scene),
        },
        {
          x: 0,
          y: 0,
          scale: 1,
          marks: [
            ...scaleBar(plan, factor, area),
            ...checkLine(frame.x + PAD, frame.y + frame.height - TITLE_HEIGHT - LINE / 2),
            ...titleBlockMarks(doc, options.title, place, frame),
          ],
        },
        ...strip(options, [scene], frame, false),
      ],
    };
  });
}
