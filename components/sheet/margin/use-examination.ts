'use client';

import { useEffect, useRef, useState } from 'react';
import type { Installation } from '@/diagram/document/schema';
import type { Examination } from '@/diagram/rules/examination';
import { Examiner, browserExaminer } from './examiner';

export interface ExaminationState {
  /** of the newest document that was examined; null before the first */
  examination: Examination | null;
  /** the document has changed since */
  stale: boolean;
  failure: string | null;
  /** ms the examination took in its worker */
  ms: number;
}

/** ms after which what waits for an idle moment is done anyway */
const LONGEST = 400;

/** Does something after what the browser is at, or when it has nothing to do. @returns what calls it off */
function later(act: () => void, idle: boolean): () => void {
  if (idle && 'requestIdleCallback' in window) {
    const asked = requestIdleCallback(act, { timeout: LONGEST });
    return () => cancelIdleCallback(asked);
  }
  const timer = setTimeout(act);
  return () => clearTimeout(timer);
}

/** Examines a document as it changes; null is not examined. */
export function useExamination(document: Installation | null): ExaminationState {
  const examiner = useRef<Examiner | null>(null);
  const told = useRef(false);
  const [state, setState] = useState<{
    of: Installation | null;
    examination: Examination | null;
    failure: string | null;
    ms: number;
  }>({
    of: null,
    examination: null,
    failure: null,
    ms: 0,
  });
  useEffect(() => {
    const mine = browserExaminer();
    examiner.current = mine;
    return () => mine.close();
  }, []);
  useEffect(() => {
    if (!document) return;
    let wanted = true;
    const examine = async () => {
      const answer = await examiner.current?.examine(document);
      if (!wanted || !answer) return;
      if ('failure' in answer) setState((before) => ({ ...before, of: document, failure: answer.failure }));
      else setState({ of: document, examination: answer.value, failure: null, ms: answer.ms });
    };
    // The edit is painted before the worker is told what it changed; a sheet that is opened hears hands and keys first.
    const callOff = later(() => void examine(), !told.current);
    told.current = true;
    return () => {
      wanted = false;
      callOff();
    };
  }, [document]);
  return { examination: state.examination, stale: state.of !== document, failure: state.failure, ms: state.ms };
}
