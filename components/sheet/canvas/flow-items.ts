import type { Node } from 'reactflow';
import type { ScenePart } from '@/diagram/layout/scene';
import { px } from './units';

export type PartNode = Node<{ part: ScenePart }, 'part'>;

/** A pointer takes a part a little outside its strokes as well. */
const REACH = 'before:absolute before:-inset-[5px]';

/** Made once per object of the scene: what did not change is the same node again. */
const nodes = new WeakMap<ScenePart, PartNode>();

/**
 * A part as a node. Its size is given from the symbol, never measured; where runs end is the scene's business, so that the
 * canvas gets no handles.
 */
export function nodeOf(part: ScenePart): PartNode {
  const known = nodes.get(part);
  if (known) return known;
  const size = { width: Math.round(px(part.width)), height: Math.round(px(part.height)) };
  const node: PartNode = {
    id: part.id,
    type: 'part',
    position: { x: px(part.x), y: px(part.y) },
    ...size,
    measured: size,
    className: REACH,
    handles: [],
    data: { part },
  };
  nodes.set(part, node);
  return node;
}
