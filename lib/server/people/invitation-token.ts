import 'server-only';
import { randomBytes } from 'node:crypto';
import { sha256 } from '@/lib/server/drawings/hash';

const UUID_BYTES = 16;

/** A token of 256 random bits that also says whose team to look in. The database keeps only the hash. */
export function makeToken(teamId: string): { token: string; tokenHash: string } {
  const team = Buffer.from(teamId.replaceAll('-', ''), 'hex');
  const token = Buffer.concat([team, randomBytes(32)]).toString('base64url');
  return { token, tokenHash: sha256(token) };
}

/** The team and the hash that a token stands for; null for what never was one. */
export function readToken(token: string): { teamId: string; tokenHash: string } | null {
  const bytes = Buffer.from(token, 'base64url');
  if (bytes.length !== UUID_BYTES + 32 || bytes.toString('base64url') !== token) return null;
  const hex = bytes.subarray(0, UUID_BYTES).toString('hex');
  const teamId = hex.replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
  return { teamId, tokenHash: sha256(token) };
}
