'use client';

import { useEffect, useRef, useState } from 'react';
import type { Installation } from '@/diagram/document/schema';
import type { Finding } from '@/diagram/rules/types';
import { browserExaminer, type Examiner, type Proof } from './examiner';

/** The remedies and the proof of the finding in hand, worked out beside the page; null while they are. */
export function useProof(document: Installation, finding: Finding | null): Proof | null {
  const examiner = useRef<Examiner | null>(null);
  const [found, setFound] = useState<{ of: Installation; finding: Finding; proof: Proof } | null>(null);
  useEffect(() => {
    const mine = browserExaminer();
    examiner.current = mine;
    return () => mine.close();
  }, []);
  useEffect(() => {
    if (!finding) return;
    let wanted = true;
    void examiner.current?.prove(document, finding).then((answer) => {
      // A proof that fails leaves the finding standing as it is: the words are enough to act on.
      if (wanted && answer && 'value' in answer) setFound({ of: document, finding, proof: answer.value });
    });
    return () => {
      wanted = false;
    };
  }, [document, finding]);
  return found && found.of === document && found.finding === finding ? found.proof : null;
}
