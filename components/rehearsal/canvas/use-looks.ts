import { useMemo } from 'react';
import type { Part } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import type { Figures } from '@/diagram/rehearsal/figures';
import type { Rehearsed } from '@/diagram/rehearsal/rehearse';
import type { Station } from '@/diagram/rehearsal/walk';
import { partLook, runLook, type PartLook, type RunLook } from '../looks';

const NOTHING: Figures = { wires: {}, parts: {}, sources: {} };
const NONE: readonly string[] = [];

interface Looks {
  figures: Figures;
  runLooks: ReadonlyMap<string, RunLook>;
  partLooks: ReadonlyMap<string, PartLook>;
}

/** How everything on a face is drawn now: at a station of a walk, else as the home stands. */
export function useLooks(
  scene: Scene,
  parts: ReadonlyMap<string, Part>,
  answer: Rehearsed | null,
  station: Station | null,
): Looks {
  const figures = station?.figures ?? answer?.figures ?? NOTHING;
  const opened = station?.opened ?? NONE;
  const inverters = useMemo(
    () => new Set([...parts.values()].filter(({ kind }) => kind === 'inverter').map(({ id }) => id)),
    [parts],
  );
  const runLooks = useMemo(
    () => new Map(scene.runs.map((run): [string, RunLook] => [run.id, runLook(run, figures, inverters)])),
    [scene, figures, inverters],
  );
  const partLooks = useMemo(
    () =>
      new Map(
        scene.parts.flatMap((drawn): [string, PartLook][] => {
          const part = parts.get(drawn.id);
          if (!part) return [];
          return [[drawn.id, partLook(part, figures, answer?.settings ?? {}, answer?.rest ?? {}, opened, inverters)]];
        }),
      ),
    [scene, parts, figures, answer, opened, inverters],
  );
  return useMemo(() => ({ figures, runLooks, partLooks }), [figures, runLooks, partLooks]);
}
