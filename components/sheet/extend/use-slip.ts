'use client';

import { useDeferredValue, useEffect, useMemo, useRef, useState } from 'react';
import { suggest } from '@/diagram/commands/extend/catalogue';
import type { Choice, Suggestion } from '@/diagram/commands/extend/types';
import type { Command } from '@/diagram/commands/types';
import { applyPatch } from '@/diagram/document/patch';
import type { Installation } from '@/diagram/document/schema';
import type { Examination } from '@/diagram/rules/examination';
import type { Finding } from '@/diagram/rules/types';
import type { Hands } from '../hands';
import { browserExaminer, type Examiner } from '../margin/examiner';
import { keyOf } from '../margin/notes';
import { useSheet } from '../use-drawing';
import { REST, useView } from '../view';

export interface SlipLine extends Suggestion {
  /** heading of a danger that it would bring */
  danger?: string;
}

export interface Slip {
  end: [string, string];
  typed: string;
  lines: SlipLine[];
  all: number;
  index: number;
  open: boolean;
  choice: Choice;
  type(text: string): void;
  choose(index: number): void;
  setOpen(open: boolean): void;
  setValue(id: string, value: number): void;
  place(goOn: boolean): void;
  leave(): void;
}

const usual = (line: Suggestion | undefined): Record<string, number> =>
  Object.fromEntries([
    ...(line?.values ?? []).map((value) => [value.id, value.value]),
    ...(line?.counts ?? []).map((count) => [count.id, count.count]),
  ]);

/** Dangers that a document has and the one on the sheet has not. */
const newDangers = (before: Examination | null, after: Examination): Finding[] => {
  const known = new Set((before?.findings ?? []).map(keyOf));
  return after.findings.filter((finding) => finding.severity === 'danger' && !known.has(keyOf(finding)));
};

/** How many lines are examined before they are chosen. */
const LOOKED_AT = 8;

/** Examines the lines of a slip one after the other, beside the page, and names the danger that a line would bring. */
function useDangers(
  doc: Installation,
  lines: readonly Suggestion[],
  now: Examination | null,
): ReadonlyMap<string, string> {
  const examiner = useRef<Examiner | null>(null);
  const [dangers, setDangers] = useState<ReadonlyMap<string, string>>(new Map());
  useEffect(() => {
    const mine = browserExaminer();
    examiner.current = mine;
    return () => mine.close();
  }, []);
  useEffect(() => {
    let wanted = true;
    const look = async () => {
      const found = new Map<string, string>();
      for (const line of lines.slice(0, LOOKED_AT)) {
        const answer = await examiner.current?.examine(applyPatch(doc, line.place(usual(line)).patch));
        if (!wanted) return;
        const danger = answer && 'value' in answer ? newDangers(now, answer.value)[0] : undefined;
        if (danger) found.set(line.id, danger.heading);
      }
      if (wanted) setDangers(found);
    };
    void look();
    return () => {
      wanted = false;
    };
  }, [doc, lines, now]);
  return dangers;
}

/** The slip of what comes next, while it is open. */
export function useSlip(hands: Hands, hoursWanted: number, now: Examination | null): Slip | null {
  const mode = useView((state) => state.mode);
  const doc = useSheet(hands.store, (state) => state.document);
  const extend = mode.kind === 'extend' ? mode : null;
  const typed = extend?.typed ?? '';
  const end = extend?.end ?? null;
  const key = end?.join(' ') ?? '';
  const found = useMemo(
    () => (end ? suggest(doc, end, { newId: hands.newId, typed, hoursWanted }) : { all: [], fitting: [] }),
    // eslint-disable-next-line react-hooks/exhaustive-deps -- `key` stands for the terminal, which is a new pair each time
    [doc, key, typed, hoursWanted, hands],
  );
  const dangers = useDangers(doc, found.fitting, now);
  const lines = useMemo(() => {
    const known = found.fitting.map(
      (line): SlipLine => (dangers.has(line.id) ? { ...line, danger: dangers.get(line.id)! } : line),
    );
    return [...known.filter((line) => !line.danger), ...known.filter((line) => line.danger)];
  }, [found.fitting, dangers]);

  const index = Math.min(extend?.index ?? 0, Math.max(0, lines.length - 1));
  const line = lines[index];
  const choice = extend?.choice;
  const command = useMemo<Command | null>(
    () => (line && choice ? line.place({ ...usual(line), ...choice }) : null),
    [line, choice],
  );

  // The ghost may come a moment later than the typing; what is placed is always the line that is shown.
  const shown = useDeferredValue(command);
  const extending = extend !== null;
  useEffect(() => {
    if (extending) hands.view.getState().set({ ghost: shown ? applyPatch(doc, shown.patch) : null });
  }, [shown, doc, extending, hands]);

  if (!extend || !end) return null;
  const { setMode } = hands.view.getState();
  const { set } = hands.view.getState();
  // The ghost stays until the next one is drawn: it does not flicker while somebody types.
  const change = (part: Partial<typeof extend>) => set({ mode: { ...extend, ...part } });
  return {
    end,
    typed: extend.typed,
    lines,
    all: found.all.length,
    index,
    open: extend.open,
    choice: { ...usual(line), ...extend.choice },
    type: (text) => change({ typed: text, index: 0, open: false, choice: {} }),
    choose: (next) => change({ index: (next + lines.length) % Math.max(1, lines.length), open: false, choice: {} }),
    setOpen: (open) => change({ open }),
    setValue: (id, value) => change({ choice: { ...extend.choice, [id]: value } }),
    place(goOn) {
      if (!command) return;
      setMode(REST);
      const held = hands.store.getState().selection;
      if (!hands.do(command)) return;
      if (!goOn) hands.store.getState().select({ parts: held.parts, terminal: end });
      else hands.extend();
    },
    leave: () => setMode(REST),
  };
}
