'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import type { Installation } from '@/diagram/document/schema';
import type { Finding } from '@/diagram/rules/types';
import type { TriedRemedy } from '@/diagram/schedules/outcomes';
import type { Worked } from '@/diagram/schedules/work-out';
import { Asker } from './asker';

export interface WorkedState {
  /** of the newest document that was worked out; null before the first */
  worked: Worked | null;
  /** the document has changed since */
  stale: boolean;
  failure: string | null;
  again(): void;
}

function useAsker() {
  const asker = useRef<Asker | null>(null);
  useEffect(() => {
    const mine = new Asker();
    asker.current = mine;
    return () => mine.close();
  }, []);
  return asker;
}

/** Works out the schedules of a document as it changes, beside the page. */
export function useWorked(document: Installation): WorkedState {
  const asker = useAsker();
  const [attempt, setAttempt] = useState(0);
  const [state, setState] = useState<{ of: Installation | null; worked: Worked | null; failure: string | null }>({
    of: null,
    worked: null,
    failure: null,
  });
  useEffect(() => {
    let wanted = true;
    void asker.current?.ask<Worked>({ kind: 'work-out', document }).then((outcome) => {
      if (!wanted || !outcome) return;
      if ('failure' in outcome) setState((before) => ({ ...before, of: document, failure: outcome.failure }));
      else setState({ of: document, worked: outcome.value, failure: null });
    });
    return () => {
      wanted = false;
    };
  }, [asker, document, attempt]);
  const again = useCallback(() => setAttempt((count) => count + 1), []);
  return { worked: state.worked, stale: state.of !== document, failure: state.failure, again };
}

/** What puts a finding right and what each edit gives; null while it is being tried. */
export function useRemedies(document: Installation, finding: Finding | null, way: string | null): TriedRemedy[] | null {
  const asker = useAsker();
  const [found, setFound] = useState<{ of: Installation; finding: Finding; remedies: TriedRemedy[] } | null>(null);
  useEffect(() => {
    if (!finding) return;
    let wanted = true;
    void asker.current?.ask<TriedRemedy[]>({ kind: 'remedies', document, finding, way }).then((outcome) => {
      // Remedies that cannot be tried are not offered: the finding stands with its words.
      if (wanted && outcome && 'value' in outcome) setFound({ of: document, finding, remedies: outcome.value });
    });
    return () => {
      wanted = false;
    };
  }, [asker, document, finding, way]);
  return found && found.of === document && found.finding === finding ? found.remedies : null;
}
