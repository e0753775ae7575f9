import 'server-only';
import { createHash } from 'node:crypto';

export const sha256 = (data: string | Buffer): string => createHash('sha256').update(data).digest('hex');

export interface ChangeFacts {
  drawingId: string;
  rev: number;
  saveId: string;
  personId: string;
  at: Date;
  label: string;
  /** JSON as stored */
  patch: string;
}

/** The link of a change in its drawing's chain: altering any field of any earlier change breaks all later ones. */
export function changeHash(prevHash: string, change: ChangeFacts): string {
  const { drawingId, rev, saveId, personId, at, label, patch } = change;
  return sha256(
    [prevHash, drawingId, rev, saveId, personId, at.toISOString(), JSON.stringify(label), patch].join('\n'),
  );
}
