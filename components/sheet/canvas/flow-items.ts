import { Position, type Edge, type Node } from 'reactflow';
import type { ScenePart, SceneRun } from '@/diagram/layout/scene';
import { px } from './units';

export type PartNode = Node<{ part: ScenePart }, 'part'>;
export type RunEdge = Edge<{ run: SceneRun }, 'run'>;

/** A pointer takes a part a little outside its strokes as well. */
const REACH = 'before:absolute before:-inset-[5px]';

/** Made once per object of the scene: what did not change is the same node again. */
const nodes = new WeakMap<ScenePart, PartNode>();
const edges = new WeakMap<SceneRun, RunEdge>();

/**
 * A part as a node. Its size is given from the symbol, never measured; where runs end is the scene's business, so that one
 * handle, of no account, is all that the canvas gets.
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
    handles: [{ type: 'source', position: Position.Top, x: 0, y: 0, width: 1, height: 1 }],
    data: { part },
  };
  nodes.set(part, node);
  return node;
}

/** A run as an edge; its path is finished before the canvas sees it. */
export function edgeOf(run: SceneRun): RunEdge {
  const known = edges.get(run);
  if (known) return known;
  const edge: RunEdge = {
    id: run.id,
    type: 'run',
    source: run.from[0],
    target: run.to[0],
    data: { run },
  };
  edges.set(run, edge);
  return edge;
}
