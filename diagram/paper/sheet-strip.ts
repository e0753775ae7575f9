import type { Scene } from '../layout/scene';
import { light } from '../symbols/palette';
import type { Area } from './iso-sheet';
import { legendMarks } from './legend';
import type { Group, Mark } from './primitives';
import { LINE, PAD, type SheetFinding, type SheetOptions } from './sheet-options';
import { TITLE_HEIGHT, TITLE_WIDTH, clipped } from './title-block';

/** Left of the title block and over it: check line, findings, legend. */

/** A line of exactly 100 mm, so that whoever prints can see whether the print was scaled. */
export const CHECK_LINE = 10_000;

export function checkLine(x: number, y: number): Mark[] {
  return [
    {
      kind: 'path',
      d: `M${x} ${y}H${x + CHECK_LINE}M${x} ${y - 150}V${y + 150}M${x + CHECK_LINE} ${y - 150}V${y + 150}M${x + CHECK_LINE / 2} ${y - 90}V${y + 90}`,
      stroke: light.ink,
      width: 25,
      cap: 'butt',
    },
    {
      kind: 'text',
      x: x + CHECK_LINE + 250,
      y: y + 90,
      text: '100 mm: if not, the print was scaled',
      size: 180,
      colour: light.grey,
    },
  ];
}

const counted = (n: number, one: string, many: string): string => `${n} ${n === 1 ? one : many}`;

/** "3 findings: 1 danger, 2 advice", and the first headings. */
export function findingsText(findings: readonly SheetFinding[] | undefined): string {
  if (!findings) return 'not examined';
  if (findings.length === 0) return 'no finding';
  const of = (severity: SheetFinding['severity']) => findings.filter((finding) => finding.severity === severity).length;
  const parts = [
    of('danger') > 0 && counted(of('danger'), 'danger', 'dangers'),
    of('defect') > 0 && counted(of('defect'), 'defect', 'defects'),
    of('advice') > 0 && `${of('advice')} advice`,
  ].filter(Boolean);
  return `${counted(findings.length, 'finding', 'findings')}: ${parts.join(', ')}`;
}

export const rank = { danger: 0, defect: 1, advice: 2 } as const;

/** The strip left of the title block: findings, then the legend. */
export function strip(options: SheetOptions, scenes: readonly Scene[], frame: Area, hasLegendSheet: boolean): Group[] {
  const area = {
    x: frame.x + PAD,
    y: frame.y + frame.height - TITLE_HEIGHT + 150,
    width: frame.width - TITLE_WIDTH - 2 * PAD,
    height: TITLE_HEIGHT - 200,
  };
  const marks: Mark[] = [];
  const findings = [...(options.findings ?? [])].sort((a, b) => rank[a.severity] - rank[b.severity]);
  const y = frame.y + frame.height - TITLE_HEIGHT - LINE / 2 + 90;
  const x = frame.x + PAD + CHECK_LINE + 6400;
  const room = frame.x + frame.width - PAD - x;
  const headings = findings.slice(0, 3).map((finding) => finding.heading);
  const words = [findingsText(options.findings), ...headings].join('. ');
  marks.push({
    kind: 'text',
    x,
    y,
    text: clipped(words, 180, room),
    size: 180,
    colour: light.ink,
    bold: findings.some((f) => f.severity !== 'advice'),
  });
  const rows = hasLegendSheet ? { ...area, height: area.height - 600 } : area;
  const legend = legendMarks(scenes, rows);
  if (legend.left > 0)
    marks.push({
      kind: 'text',
      x: area.x,
      y: area.y + area.height - 120,
      text: `${legend.left} more on the last sheet`,
      size: 180,
      colour: light.grey,
    });
  return [...legend.groups, { x: 0, y: 0, scale: 1, marks }];
}

/** True where the strip cannot hold the whole legend of these scenes. */
export function needsLegendSheet(scenes: readonly Scene[], frame: Area): boolean {
  return (
    legendMarks(scenes, { x: 0, y: 0, width: frame.width - TITLE_WIDTH - 2 * PAD, height: TITLE_HEIGHT - 200 }).left > 0
  );
}
