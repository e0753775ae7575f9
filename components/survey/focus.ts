import type { Column } from '@/diagram/survey/columns';

/** How a cell is found on the page, whether it stands in the table or in a form on a phone. */
export const cellName = (room: string, column: Column): string => `${room}:${column}`;

const isShown = (cell: HTMLElement): boolean => cell.checkVisibility?.() ?? true;

const find = (name: string): HTMLInputElement | undefined =>
  [...document.querySelectorAll<HTMLInputElement>('[data-cell]')].find((cell) => cell.dataset.cell === name && isShown(cell));

/** Puts the caret into a cell, at once or when it has been drawn. */
export function focusCell(room: string, column: Column): void {
  const go = () => {
    const cell = find(cellName(room, column));
    cell?.focus();
    cell?.select();
    return cell !== undefined;
  };
  if (!go()) requestAnimationFrame(go);
}
