import { Ground, blockTexts, placeOneOf, type Anchor, type Label } from './labels';
import { BODY, SMALL } from './lettering';
import type { SceneFrame } from './scene';

/** Names of rooms and switchboards find a corner of their frame that no run passes. */

const INSET = 250;

/** Sets the frame's name where there is room; what it carries as text is taken as the wish. */
export function nameFrame(ground: Ground, frame: SceneFrame): void {
  const [wish] = frame.texts;
  if (!wish) return;
  const block = placeOneOf(ground, frame.kind === 'room' ? roomForms(frame, wish.text) : boardForms(frame, wish.text));
  frame.texts = block ? blockTexts(block) : [];
}

const at = (x: number, y: number, horizontal: Anchor['horizontal'], vertical: Anchor['vertical']): Anchor => ({
  x,
  y,
  horizontal,
  vertical,
});

/** At the foot: in one line, set wide or close, else in two. */
function roomForms(frame: SceneFrame, name: string): Label[] {
  const { x, y, width, height } = frame;
  const foot = y + height - INSET + 72;
  const places = [at(x + INSET, foot, 'start', 'bottom'), at(x + width - INSET, foot, 'end', 'bottom')];
  const form = (lines: string[], size: number, spaced = false): Label => ({
    owner: frame.id,
    size,
    lines: lines.map((text) => [{ text, bold: true }]),
    places,
    ...(spaced && { spaced }),
  });
  return [
    form([name], BODY, true),
    form([name], BODY),
    form(halves(name), BODY),
    form(halves(name), SMALL),
    form([name], BODY),
  ];
}

/** Over the box at the right, else at another corner. */
function boardForms(frame: SceneFrame, name: string): Label[] {
  const { x, y, width, height } = frame;
  const places = [
    at(x + width, y - 120, 'end', 'bottom'),
    at(x, y - 120, 'start', 'bottom'),
    at(x + width - 120, y + height - 120, 'end', 'bottom'),
    at(x + 120, y + height - 120, 'start', 'bottom'),
    at(x + width, y + height + 150, 'end', 'top'),
    at(x, y + height + 150, 'start', 'top'),
    at(x + width / 2, y - 120, 'middle', 'bottom'),
  ];
  return [{ owner: frame.id, size: BODY, lines: [[{ text: name, tone: 'grey' }]], places }];
}

/** A name in two lines of about the same length. */
function halves(name: string): string[] {
  const words = name.split(' ');
  let best = [name];
  let longest = name.length;
  for (let i = 1; i < words.length; i++) {
    const pair = [words.slice(0, i).join(' '), words.slice(i).join(' ')];
    const most = Math.max(...pair.map((line) => line.length));
    if (most < longest) [best, longest] = [pair, most];
  }
  return best;
}
