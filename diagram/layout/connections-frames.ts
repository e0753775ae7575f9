import { byCode, type Installation, type Part } from '../document/schema';
import { MODULE } from '../symbols/types';
import type { PlacedCable } from './connections-ends';
import type { Page } from './connections-page';
import type { Body } from './ends';
import { BODY, SMALL, breakLines } from './lettering';
import { m } from './overview-metrics';
import type { SceneFrame } from './scene';

/** Switchboards as dashed boxes round what stands in them, and a brace over the cores of each cable. */

const IN_BOARD: ReadonlySet<string> = new Set([
  'joint',
  'switch',
  'switch-2way',
  'switch-cross',
  'switch-2pole',
  'regulator',
  'mcb',
  'rcbo',
  'rcd',
  'isolator',
  'line-bar',
  'neutral-bar',
  'earth-bar',
  'spd',
  'changeover',
]);
const PAD = m(3) + MODULE / 2;

export function connectionFrames(
  doc: Installation,
  page: Page,
  bodies: ReadonlyMap<string, Body>,
  cables: readonly PlacedCable[],
): SceneFrame[] {
  const boards = new Map<string, Part[]>();
  for (const part of page.parts)
    if (IN_BOARD.has(part.kind)) boards.set(part.board ?? '', [...(boards.get(part.board ?? '') ?? []), part]);
  const named = [...boards.keys()].filter(Boolean);
  const place = doc.places.find((p) => p.id === page.place);
  const frames: SceneFrame[] = [];
  for (const [board, parts] of [...boards].sort(([a], [b]) => byCode(a, b))) {
    // where boards are named, what names none stands outside them
    if (board === '' && named.length > 0) continue;
    const boxes = parts.map((part) => bodies.get(part.id)!);
    const left = Math.min(...boxes.map((b) => b.x)) - PAD;
    const top = Math.min(...boxes.map((b) => b.y)) - PAD;
    const width = Math.max(...boxes.map((b) => b.x + b.width)) + PAD - left;
    const height = Math.max(...boxes.map((b) => b.y + b.height)) + PAD - top;
    const name = board || place?.name || '';
    frames.push({
      id: `board:${board}`,
      kind: 'switchboard',
      x: left,
      y: top,
      width,
      height,
      texts: name ? [{ text: name, x: left + 150, y: top - 120, size: BODY, bold: true }] : [],
      ...(page.place && { place: page.place }),
    });
  }
  const feet = cables.filter(({ cable }) => cable.atFoot).map(({ left }) => left);
  const room = (left: number): number =>
    Math.min(m(24), ...feet.filter((other) => other > left).map((other) => other - left - 200));
  for (const { cable, left, right, y } of cables)
    frames.push({
      id: `brace:${cable.id}`,
      kind: 'brace',
      x: left,
      y: cable.atFoot ? y - MODULE : y,
      width: right - left,
      height: MODULE,
      texts: braceTexts(cable.lines, left, y, cable.atFoot ? room(left) : null),
    });
  return frames.sort((a, b) => byCode(a.id, b.id));
}

/** Over the brace in lines; under a brace at the foot no wider than to the next one. */
function braceTexts(lines: readonly string[], left: number, y: number, footWidth: number | null): SceneFrame['texts'] {
  const [first = '', ...rest] = lines;
  if (footWidth === null)
    return [
      { text: first, x: left, y: y - 600 + (rest.length === 0 ? 400 : 0), size: BODY, bold: true },
      ...rest.map((text, i) => ({ text, x: left, y: y - 150 + 370 * i, size: SMALL, tone: 'grey' as const })),
    ];
  const heads = breakLines(first, BODY, footWidth);
  const words = rest
    .flatMap((text) => text.split(/ (?=to )| (?=from )/))
    .flatMap((text) => breakLines(text, SMALL, footWidth));
  const below = y + 450 + 400 * (heads.length - 1);
  return [
    ...heads.map((text, i) => ({ text, x: left, y: y + 450 + 400 * i, size: BODY, bold: true })),
    ...words.map((text, i) => ({ text, x: left, y: below + 400 + 370 * i, size: SMALL, tone: 'grey' as const })),
  ];
}
