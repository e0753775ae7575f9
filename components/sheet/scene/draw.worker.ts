import { drawWith } from './draw';
import type { DrawnAnswer, Told } from './wanted';

const draw = drawWith();

/** Works the drawing out beside the page. */
self.onmessage = ({ data }: MessageEvent<{ id: number; told: Told }>) => {
  const { id, told } = data;
  try {
    const answer: DrawnAnswer = draw(told);
    self.postMessage({ id, ...answer });
  } catch (error) {
    self.postMessage({ id, failure: error instanceof Error ? error.message : String(error) });
  }
};
