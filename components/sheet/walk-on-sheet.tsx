'use client';

import dynamic from 'next/dynamic';
import type { Scene } from '@/diagram/layout/scene';
import { walkShown } from './margin/showing';
import { useSheet, type OpenDrawing } from './use-drawing';
import { useView } from './view';

const WalkLayers = dynamic(() => import('@/components/rehearsal/on-sheet/walk-layers'), { ssr: false });

/** The fault walk over the canvas, while one is shown; what draws it is fetched with the first. */
export function WalkOnSheet({ drawing, scene }: { drawing: OpenDrawing; scene: Scene }) {
  const walk = useView(walkShown);
  const camera = useView((state) => state.camera);
  const document = useSheet(drawing.store, (state) => state.document);
  return walk && <WalkLayers key={walk.finding} walk={walk} document={document} scene={scene} camera={camera} />;
}
