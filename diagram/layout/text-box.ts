import { textDescent, textWidth } from './lettering';
import type { Box } from './route-grid';
import type { SceneText } from './scene';

/** The box of a text on the sheet. */
export function textBox(text: SceneText): Box {
  const width = textWidth(text.text, text.size, text.spaced);
  const x = text.anchor === 'end' ? text.x - width : text.anchor === 'middle' ? text.x - width / 2 : text.x;
  return { x, y: text.y - text.size, width, height: text.size + textDescent(text.size) };
}
