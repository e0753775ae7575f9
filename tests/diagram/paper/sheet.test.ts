import { describe, expect, it } from 'vitest';
import { emptyDocument } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import { connectionPages } from '@/diagram/layout/connections-page';
import { fontSize } from '@/diagram/layout/lettering';
import { textBox } from '@/diagram/layout/text-box';
import { PAPER_SIZES, frameOf, paperSize } from '@/diagram/paper/iso-sheet';
import type { Group, Mark, Page } from '@/diagram/paper/primitives';
import { CHECK_LINE, findingsText, sheetPages, type SheetOptions } from '@/diagram/paper/sheet';
import { cuts } from '@/diagram/paper/split';
import { paperSvg } from '@/diagram/paper/svg';
import { CAUTIONS, clipped } from '@/diagram/paper/title-block';
import { light } from '@/diagram/symbols/palette';
import { draftDocument } from '@/diagram/survey/draft';
import { examples, toldHome, unplaced } from '../layout/homes';
import { optionsOf, sixRooms, supplyOf } from '../survey/surveys';

const title = {
  number: 'OH-214',
  title: 'Saltmarsh Row 3',
  client: 'M. Arroyo & <daughter>',
  address: 'Saltmarsh Row 3, Tillmere',
  team: 'Tillmere Electrics',
  drawnBy: 'R. A.',
  drawnOn: '2026-11-30',
  checkedBy: 'T. B.',
  revision: 'C',
  state: 'for review',
};
const options = (more: Partial<SheetOptions> = {}): SheetOptions => ({ paper: 'A3', title, ...more });

interface Placed {
  mark: Mark;
  scale: number;
}

/** All marks of a page with the scale at which they stand. */
function marks(page: Page): Placed[] {
  const of = (group: Group, outer: number): Placed[] => {
    const scale = outer * group.scale;
    return [
      ...group.marks.map((mark) => ({ mark, scale })),
      ...(group.groups ?? []).flatMap((child) => of(child, scale)),
    ];
  };
  return page.groups.flatMap((group) => of(group, 1));
}

const words = (page: Page): string =>
  marks(page)
    .flatMap(({ mark }) => (mark.kind === 'text' ? [mark.text] : []))
    .join('\n');

describe('sheets of paper', () => {
  it.each([
    ['A4', 297, 210],
    ['A3', 420, 297],
    ['A2', 594, 420],
    ['A1', 841, 594],
  ] as const)('%s is %d by %d mm (ISO 216)', (paper, width, height) => {
    expect(paperSize(paper)).toEqual({ width: width * 100, height: height * 100 });
    const [page] = sheetPages(toldHome(), options({ paper }));
    expect(page).toMatchObject({ width: width * 100, height: height * 100 });
    // filing margin 20 mm at the left, 10 mm elsewhere (ISO 5457)
    expect(frameOf(paper)).toEqual({ x: 2000, y: 1000, width: width * 100 - 3000, height: height * 100 - 2000 });
  });

  it('says who, what, which revision and the cautions on every sheet', () => {
    for (const page of sheetPages(toldHome(), options({ face: 'all' }))) {
      const text = words(page);
      for (const value of [
        'OH-214',
        'Saltmarsh Row 3',
        'M. Arroyo & <daughter>',
        'Tillmere Electrics',
        'R. A. 2026-11-30',
        'T. B.',
        'for review',
        '230 V 50 Hz, TT',
      ])
        expect(text).toContain(value);
      expect(text.replaceAll('\n', ' ')).toContain(CAUTIONS.slice(0, 60));
    }
  });

  it('numbers its sheets and gives every room a sheet of connections', () => {
    const doc = toldHome();
    const pages = sheetPages(doc, options({ face: 'all', paper: 'A1' }));
    pages.forEach((page, i) => expect(words(page)).toContain(`${i + 1} / ${pages.length}`));
    for (const { name } of connectionPages(doc))
      expect(pages.some((page) => words(page).includes(`Connections, ${name}`))).toBe(true);
    const one = sheetPages(doc, options({ face: 'connections', place: 'kitchen', paper: 'A1' }));
    expect(one.filter((page) => words(page).includes('Connections, Kitchen'))).toHaveLength(1);
  });

  it('draws a check line of exactly 100 mm on every sheet', () => {
    expect(CHECK_LINE).toBe(10_000);
    for (const page of sheetPages(toldHome(), options({ face: 'all' }))) {
      const lines = marks(page).flatMap(({ mark, scale }) =>
        mark.kind === 'path' && scale === 1 ? [/^M(\d+) (\d+)H(\d+)M/.exec(mark.d)] : [],
      );
      expect(lines.some((found) => found && Number(found[3]) - Number(found[1]) === CHECK_LINE)).toBe(true);
    }
  });

  it('never letters below 1.8 mm: a drawing that would is cut over several sheets', () => {
    for (const paper of PAPER_SIZES)
      for (const [, doc] of [...examples().slice(0, 2), ['told', toldHome()] as const])
        for (const page of sheetPages(doc, options({ paper, face: 'all' })))
          for (const { mark, scale } of marks(page).filter(
            ({ scale: s, mark: m }) => m.kind === 'text' && s !== 0.5 && m.text !== 'kWh',
          ))
            if (mark.kind === 'text' && scale >= 0.8) expect(mark.size * scale).toBeGreaterThanOrEqual(180);
    const cut = sheetPages(toldHome(), options());
    expect(cut.length).toBeGreaterThan(1);
    expect(words(cut[0]!)).toContain('match line, goes on at sheet 2');
    expect(words(cut[1]!)).toContain('match line, goes on at sheet 1');
    expect(words(cut[0]!)).toMatch(/1:1\.25/);
  });

  it('shows the whole drawing once over the sheets it is cut to', () => {
    const doc = toldHome();
    const scene = buildScene(doc, 'overview');
    const windows = sheetPages(doc, options()).flatMap((page) =>
      page.groups.flatMap((group) => (group.clip ? [group.clip] : [])),
    );
    for (const part of scene.parts) {
      const middle = { x: part.x + Math.min(part.width, 500) / 2, y: part.y + part.height / 2 };
      const seen = windows.filter(
        (w) => w.x <= middle.x && middle.x < w.x + w.width && w.y <= middle.y && middle.y < w.y + w.height,
      );
      expect(seen).toHaveLength(1);
    }
  });

  it('cuts into as few pieces as fit, through nothing that is drawn or written but runs, bars and frames', () => {
    const scene = buildScene(toldHome(), 'overview');
    for (const [axis, size] of [
      ['x', 'width'],
      ['y', 'height'],
    ] as const)
      for (const most of [18_000, 24_000, 47_000]) {
        const edges = cuts(scene, axis, 0, scene[size], most);
        expect(edges).toHaveLength(Math.ceil(scene[size] / most) + 1);
        expect([edges[0], edges.at(-1)]).toEqual([0, scene[size]]);
        edges.slice(1).forEach((edge, i) => expect(edge - edges[i]!).toBeLessThanOrEqual(most));
        const whole = [
          ...scene.parts.filter(({ kind }) => !kind.endsWith('-bar')),
          ...[...scene.parts, ...scene.runs].flatMap(({ texts }) => texts.map(textBox)),
        ];
        for (const edge of edges.slice(1, -1))
          expect(whole.filter((box) => box[axis] < edge && edge < box[axis] + box[size])).toEqual([]);
      }
  });

  it('is black on white in the light palette, and tells conductors apart without colour', () => {
    const doc = toldHome();
    const [page] = sheetPages(doc, options({ face: 'connections', place: 'kitchen', paper: 'A1' }));
    const strokes = marks(page!).flatMap(({ mark }) => (mark.kind === 'path' && mark.stroke ? [mark] : []));
    expect(strokes.some((mark) => mark.stroke === light.paper && mark.width === 140)).toBe(true);
    const dashes = new Set(strokes.map((mark) => mark.dash?.join(' ') ?? 'solid'));
    expect([...dashes]).toEqual(expect.arrayContaining(['solid', '350 130', '110 90']));
  });

  it('sums the findings up, the gravest first', () => {
    expect(findingsText(undefined)).toBe('not examined');
    expect(findingsText([])).toBe('no finding');
    expect(
      findingsText([
        { severity: 'advice', heading: 'a' },
        { severity: 'danger', heading: 'b' },
      ]),
    ).toBe('2 findings: 1 danger, 1 advice');
    const findings = [
      { severity: 'advice', heading: 'Mind the step' },
      { severity: 'danger', heading: 'E7 comes home the wrong way' },
    ] as const;
    const text = words(sheetPages(toldHome(), options({ findings }))[0]!);
    expect(text).toContain('2 findings: 1 danger, 1 advice. E7 comes home the wrong way');
  });

  it('keeps the rest of a long legend or list of findings for a last sheet', () => {
    const findings = Array.from({ length: 9 }, (_, i) => ({
      severity: 'defect' as const,
      heading: `Finding number ${i + 1}`,
    }));
    const last = words(sheetPages(toldHome(), options({ findings })).at(-1)!);
    expect(last).toContain('Legend and findings');
    expect(last).toContain('Finding number 9');
    expect(last).toContain('surge arrester');
  });

  it('cuts a text that is too long for its cell', () => {
    expect(clipped('short', 250, 5000)).toBe('short');
    expect(clipped('a very long name of a client', 250, 2500)).toBe('a very long…');
  });

  it('gives a sheet even to a drawing with nothing on it', () => {
    const empty = emptyDocument('Nothing yet', 'GB', supplyOf('TN-S'));
    expect(sheetPages(empty, options({ face: 'all' }))).toHaveLength(1);
    expect(sheetPages(empty, options({ face: 'connections' }))).toHaveLength(1);
  });
});

describe('svg', () => {
  it('states millimetres, carries plain text and paths only, and escapes what people type', () => {
    const doc = { ...toldHome(), title: '</text><script>alert(1)</script>' };
    const svg = paperSvg(doc, options({ title: { ...title, title: doc.title } }));
    expect(svg).toMatch(/width="420mm" height="297mm" viewBox="0 0 42000 29700"/);
    expect(svg).not.toMatch(/<script|foreignObject|<image|href=/);
    expect(svg).toContain('M. Arroyo &amp; &lt;daughter&gt;');
    expect([...new Set(svg.match(/<([a-zA-Z]+)/g))].sort()).toEqual([
      '<clipPath',
      '<g',
      '<path',
      '<rect',
      '<svg',
      '<text',
      '<title',
    ]);
    expect(svg).not.toMatch(/NaN|undefined|Infinity/);
  });

  it('sets lettering by the height of its capitals', () => {
    const svg = paperSvg(toldHome(), options());
    expect(svg).toContain(`font-size="${Number(fontSize(250).toFixed(3))}"`);
  });

  it('carries the font where it is given, and gives any sheet by its number', () => {
    const doc = toldHome();
    expect(paperSvg(doc, { ...options(), fonts: { regular: 'AAAA', bold: 'BBBB' } })).toContain(
      'src:url(data:font/woff2;base64,BBBB)',
    );
    expect(paperSvg(doc, { ...options(), sheet: 2 })).toContain('>2 / ');
    expect(paperSvg(doc, { ...options(), sheet: 99 })).toBe(
      paperSvg(doc, { ...options(), sheet: sheetPages(doc, options()).length }),
    );
  });

  it('is the same for the same drawing, placed or not', () => {
    const placed = draftDocument(sixRooms(), optionsOf());
    expect(paperSvg(placed, options())).toBe(paperSvg(unplaced(placed), options()));
  });
});
