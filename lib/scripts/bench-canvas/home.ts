import { buildScene } from '@/diagram/layout/build-scene';
import type { Scene } from '@/diagram/layout/scene';
import type { Installation, SurveyRoom } from '@/diagram/document/schema';
import { draftDocument } from '@/diagram/survey/draft';

const room = (i: number): SurveyRoom => ({
  id: `r${String(i).padStart(3, '0')}`,
  order: i,
  name: `Room ${i}`,
  kind: 'room',
  lamps: 4,
  lampWatts: 9,
  fans: 1,
  fanWatts: 60,
  outlets: 4,
  heavy: i % 5 === 0 ? [{ what: 'Water heater', watts: 2000 }] : [],
  keepLamps: 2,
  keepFans: 0,
  keepOutletWatts: 0,
  hours: 2,
});

/** A drafted home with backup of about so many parts. */
export function canvasHome(parts: number): Installation {
  const draft = (rooms: number) =>
    draftDocument(
      Array.from({ length: rooms }, (_, i) => room(i)),
      {
        title: `${parts} parts`,
        practice: 'IEC',
        supply: { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.3, zln: 0.3 },
        hoursWanted: 2,
      },
    );
  let rooms = Math.round(parts / 22);
  while (draft(rooms).parts.length < parts) rooms++;
  return draft(rooms);
}

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
