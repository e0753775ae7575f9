import { buildScene } from '@/diagram/layout/build-scene';
import type { Scene } from '@/diagram/layout/scene';
import type { Installation } from '@/diagram/document/schema';

/** px of the canvas for 1/100 mm, as the sheet has it */
const PX = 0.036;
/** Default nodes are three times as wide as a symbol: so far apart they lie about as thick on the page as the symbols do. */
const SPREAD = 3;

/** As many of reactflow's default nodes and edges as the sheet has parts and runs, where those stand. */
export const bareGraph = (scene: Scene, zoom: number) => ({
  zoom,
  nodes: scene.parts.map((part) => ({
    id: part.id,
    position: { x: part.x * PX * SPREAD, y: part.y * PX * SPREAD },
    data: { label: part.id },
  })),
  edges: scene.runs.map((run) => ({ id: run.id, source: run.from[0], target: run.to[0] })),
});

export const overviewOf = (home: Installation): Scene => buildScene(home, 'overview');
