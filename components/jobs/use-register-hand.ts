'use client';

import { useRouter } from 'next/navigation';
import { useCallback, useState, type KeyboardEvent } from 'react';
import { lastSheet } from '@/components/frame/last-sheet';
import { jobTabs } from '@/components/frame/tabs';
import type { JobRow } from '@/lib/shared/jobs';

const focusRow = (id: string) =>
  [...document.querySelectorAll<HTMLElement>('[data-job]')].find((row) => row.dataset.job === id)?.focus();

export interface RegisterHand {
  row: string | undefined;
  unfolded: string | null;
  sheet: string;
  take(id: string): void;
  fold(id: string, unfold: boolean): void;
  choose(sheet: string): void;
  onKey(event: KeyboardEvent): void;
}

/**
 * What is in hand in the register: a row, whether its set lies open, and a sheet of it. Up and down change the row, left
 * and right the sheet, Enter unfolds and then opens, digits open that sheet, Esc folds.
 */
export function useRegisterHand(rows: readonly JobRow[]): RegisterHand {
  const router = useRouter();
  const [wanted, setWanted] = useState<string>();
  const [unfolded, setUnfolded] = useState<string | null>(null);
  const [sheet, setSheet] = useState('overview');
  const row = rows.some((job) => job.id === wanted) ? wanted : rows[0]?.id;

  const fold = useCallback((id: string, unfold: boolean) => {
    setWanted(id);
    setUnfolded(unfold ? id : null);
    if (unfold) setSheet(lastSheet(id) ?? 'overview');
  }, []);

  const step = (by: number) => {
    const next = rows[rows.findIndex((job) => job.id === row) + by];
    if (!next) return;
    setWanted(next.id);
    focusRow(next.id);
  };

  const onKey = (event: KeyboardEvent) => {
    if (!row || event.ctrlKey || event.metaKey || event.altKey) return;
    const open = unfolded === row;
    const sheets = jobTabs(row).filter((tab) => tab.number !== undefined);
    const at = sheets.findIndex((tab) => tab.id === sheet);
    const onRow = event.currentTarget instanceof HTMLButtonElement;
    const turn = (by: number) => setSheet(sheets[(at + by + sheets.length) % sheets.length]!.id);
    const numbered = open ? sheets.find((tab) => String(tab.number) === event.key) : undefined;

    const actions: Record<string, (() => void) | undefined> = {
      ArrowDown: onRow ? () => step(1) : undefined,
      ArrowUp: onRow ? () => step(-1) : undefined,
      Home: onRow ? () => rows[0] && focusRow(rows[0].id) : undefined,
      End: onRow ? () => rows.length > 0 && focusRow(rows.at(-1)!.id) : undefined,
      ArrowRight: open ? () => turn(1) : undefined,
      ArrowLeft: open ? () => turn(-1) : undefined,
      Enter: !onRow ? undefined : open ? () => router.push(sheets[at]!.href) : () => fold(row, true),
      Escape: open
        ? () => {
            fold(row, false);
            focusRow(row);
          }
        : undefined,
    };
    const action = numbered ? () => router.push(numbered.href) : actions[event.key];
    if (!action) return;
    event.preventDefault();
    event.stopPropagation();
    action();
  };

  return { row, unfolded, sheet, take: setWanted, fold, choose: setSheet, onKey };
}
