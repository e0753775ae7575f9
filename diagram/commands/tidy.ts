import { applyPatch, diff } from '../document/patch';
import { canonical, type Face, type Installation } from '../document/schema';
import { placeAll } from '../layout/place';
import type { Command } from './types';

/**
 * Places parts anew in the order of current; what a person pinned stays.
 * @param ids the parts to place; all where null
 */
export function tidyByBands(doc: Installation, face: Face, ids: readonly string[] | null): Command {
  const chosen = ids && new Set(ids);
  const kept = Object.entries(doc.sheet?.[face] ?? {}).filter(
    ([id, at]) => at.pinned || (chosen !== null && !chosen.has(id)),
  );
  const loose = canonical({ ...doc, sheet: { ...doc.sheet, [face]: Object.fromEntries(kept) } });
  return { label: 'Tidy the sheet', patch: diff(doc, applyPatch(loose, placeAll(loose))) };
}
