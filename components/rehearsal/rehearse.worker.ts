import { createRehearsal, type Question, type Rehearsed } from '@/diagram/rehearsal/rehearse';
import type { Told } from './rehearser';

/** The home that is being rehearsed; made ready once a document. */
let rehearse: ((question: Question) => Rehearsed) | undefined;

/** Rehearses beside the page, so that the sheet never waits for it. */
self.onmessage = ({ data }: MessageEvent<Told>) => {
  const { id, document, question } = data;
  try {
    if (document) rehearse = createRehearsal(document);
    if (!rehearse) throw new Error('A question came before the drawing it is about.');
    self.postMessage({ id, value: rehearse(question) });
  } catch (error) {
    self.postMessage({ id, failure: error instanceof Error ? error.message : String(error) });
  }
};
