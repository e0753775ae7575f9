import type { Allowance } from '../practices/types';
import { requireNonNegative } from './requirements';

/**
 * What an allowance counts of a group of currents. With `firstA` each current is counted whole up to it and by `rest`
 * above; with `ranked` the largest are counted by its shares; else all by `rest`. A current is never counted above
 * itself,
 * but for the outlet in a cooker's control unit.
 * @param currentsA A, each >= 0
 * @param options.perItem applies `firstA` to each current (a cooker) instead of to their sum (heating and power)
 * @param options.outlets how many control units hold an outlet
 * @returns A
 * @throws RangeError naming the current
 * @source IET GN1 Table H2, J. Whitfield Table 6.2
 */
export function allowedA(
  currentsA: readonly number[],
  allowance: Allowance,
  options: { perItem?: boolean; outlets?: number } = {},
): number {
  currentsA.forEach((currentA, i) => requireNonNegative(`currentsA.${i}`, currentA));
  const extra = (allowance.socketA ?? 0) * (options.outlets ?? 0);
  const sum = currentsA.reduce((total, currentA) => total + currentA, 0);
  const { firstA, ranked = [], rest } = allowance;
  if (firstA !== undefined) {
    const counted = (currentA: number) => Math.min(currentA, firstA) + rest * Math.max(0, currentA - firstA);
    return (
      (options.perItem ? currentsA.reduce((total, currentA) => total + counted(currentA), 0) : counted(sum)) + extra
    );
  }
  const falling = [...currentsA].sort((a, b) => b - a);
  return falling.reduce((total, currentA, i) => total + currentA * (ranked[i] ?? rest), 0) + extra;
}

/** The allowance in words, as it stands on the demand sheet. */
export function allowanceText(allowance: Allowance): string {
  const percent = (share: number) => `${Math.round(share * 100)} %`;
  const { firstA, ranked = [], rest, socketA } = allowance;
  const outlet = socketA ? `, ${socketA} A more for an outlet in its switch` : '';
  if (firstA !== undefined) return `${firstA} A whole, ${percent(rest)} of what is above${outlet}`;
  if (rest === 1) return 'whole';
  if (ranked.length === 0) return percent(rest);
  const which = ranked.length === 1 ? 'the largest' : `the ${ranked.length} largest`;
  const shares = ranked.every((share) => share === 1) ? 'whole' : ranked.map(percent).join(', ');
  return `${which} ${shares}, ${percent(rest)} of the rest`;
}
