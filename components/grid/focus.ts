/** How a cell is found on the page, whether it stands in a table or in a form on a phone. */
export const cellName = (row: string, column: string): string => `${row}:${column}`;

const isShown = (cell: HTMLElement): boolean => cell.checkVisibility?.() ?? true;

const find = (name: string): HTMLElement | undefined =>
  [...document.querySelectorAll<HTMLElement>('[data-cell]')].find(
    (cell) => cell.dataset.cell === name && isShown(cell),
  );

/** Puts the caret into a cell, at once or when it has been drawn. */
export function focusCell(row: string, column: string): void {
  const go = () => {
    const cell = find(cellName(row, column));
    cell?.focus();
    if (cell instanceof HTMLInputElement) cell.select();
    return cell !== undefined;
  };
  if (!go()) requestAnimationFrame(go);
}
