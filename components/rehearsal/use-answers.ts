'use client';

import { useEffect, useState } from 'react';
import type { Installation } from '@/diagram/document/schema';
import type { Question } from '@/diagram/rehearsal/rehearse';
import { sayChange } from '@/diagram/rehearsal/say-change';
import { writeAddress } from './address';
import { browserRehearser, type Rehearser } from './rehearser';
import type { RehearsalState, RehearsalStore } from './state';

const questionOf = ({ stance, condition, faults, hand }: RehearsalState): Question => ({
  stance,
  ...(condition && { condition }),
  faults,
  hand,
});

/** The address follows what is rehearsed, so that a reload or a copied link brings it back; the history does not grow by it. */
function writeAddressBar(state: RehearsalState): void {
  if (state.condition !== null) return;
  const query = writeAddress(state);
  const wanted = `${window.location.pathname}${query ? `?${query}` : ''}`;
  if (wanted !== `${window.location.pathname}${window.location.search}`) window.history.replaceState(null, '', wanted);
}

/** Keeps the address of the window in step with the rehearsal. */
export function useAddressBar(store: RehearsalStore): void {
  useEffect(() => store.subscribe(writeAddressBar), [store]);
}

/**
 * Keeps the answers in step with the questions: asks when the drawing or the rehearsal changes, and takes an answer only to
 * the question that was put last.
 * @returns asks once more, after a failure
 */
export function useAnswers(
  store: RehearsalStore,
  document: Installation,
  makeRehearser: () => Rehearser = browserRehearser,
): () => void {
  const [again, setAgain] = useState(0);
  useEffect(() => {
    const rehearser = makeRehearser();
    let asked: Question | null = null;
    const ask = () => {
      const state = store.getState();
      const question = questionOf(state);
      if (asked && (Object.keys(question) as (keyof Question)[]).every((key) => asked![key] === question[key])) return;
      asked = question;
      void rehearser.ask(document, question).then((outcome) => {
        if (!outcome || asked !== question) return;
        if ('failure' in outcome) return store.getState().set({ failure: outcome.failure });
        const { value } = outcome;
        const before = store.getState().answer;
        const said = before ? sayChange(document, before, value) : '';
        // The condition that the address asked for has become a stance: from now on that is what is asked.
        asked = { ...question, stance: value.stance };
        delete asked.condition;
        store.getState().set({
          answer: value,
          failure: null,
          stance: value.stance,
          condition: null,
          ...(said && { said }),
        });
      });
    };
    ask();
    const stop = store.subscribe(ask);
    return () => {
      stop();
      rehearser.close();
    };
  }, [store, document, makeRehearser, again]);
  return () => {
    store.getState().set({ failure: null });
    setAgain(again + 1);
  };
}
