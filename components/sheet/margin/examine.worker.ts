import type { Installation } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';

/** Examines beside the page, so that drawing never waits for it. */
self.onmessage = ({ data }: MessageEvent<{ id: number; document: Installation }>) => {
  const started = performance.now();
  try {
    self.postMessage({ id: data.id, examination: examine(data.document), ms: performance.now() - started });
  } catch (error) {
    self.postMessage({ id: data.id, failure: error instanceof Error ? error.message : String(error) });
  }
};
