import { memo, type MouseEvent } from 'react';
import type { Scene, SceneRun } from '@/diagram/layout/scene';
import type { Hands } from '../hands';
import { Layer } from './layer';
import { pathOf } from './run-shape';
import { PX } from './units';

/** px about a run within which a pointer takes it */
const REACH = 14;

/** Takes a run in hand, alone or with what is in hand already. */
function take({ store }: Hands, run: SceneRun, { ctrlKey, metaKey, shiftKey }: MouseEvent): void {
  const { selection, select } = store.getState();
  if (!ctrlKey && !metaKey && !shiftKey) return select({ parts: [], wires: run.wires, terminal: null });
  const others = selection.wires.filter((wire) => !run.wires.includes(wire));
  const held = others.length < selection.wires.length;
  select({ wires: held ? others : [...others, ...run.wires] });
}

/**
 * What a pointer meets of the runs. They are no edges of the library, which would ask each of them at every move of the
 * canvas whether it is in sight; here nothing happens before one is touched.
 */
export const RunHits = memo(function RunHits({ scene, hands }: { scene: Scene; hands: Hands }) {
  return (
    <Layer scene={scene} level={-1} name="hits">
      {scene.runs.map((run) => (
        <path
          key={run.id}
          data-run={run.id}
          d={pathOf(run)}
          className="cursor-pointer"
          fill="none"
          pointerEvents="stroke"
          strokeWidth={REACH / PX}
          onClick={(event) => take(hands, run, event)}
          onDoubleClick={() => hands.editRun(run)}
        />
      ))}
    </Layer>
  );
});
