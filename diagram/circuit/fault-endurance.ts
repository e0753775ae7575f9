import { byDesignation } from '../document/names';
import type { Urge } from './fault-trips';

/** A device that wants to open, with what is left of its times. */
export interface Pending {
  urge: Urge;
  earlyS: number;
  lateS: number;
}

/** Shares of their times that devices have endured, by id. */
export type Endured = Map<string, { early: number; late: number }>;

/** What is left of a device's times, when it has endured shares of them already. */
export function remaining(urge: Urge, endured: Endured): Pending {
  const { early = 0, late = 0 } = endured.get(urge.part.id) ?? {};
  return { urge, earlyS: urge.earliestS * Math.max(0, 1 - early), lateS: urge.latestS * Math.max(0, 1 - late) };
}

export function endure(urge: Urge, seconds: number, endured: Endured): void {
  const { early = 0, late = 0 } = endured.get(urge.part.id) ?? {};
  endured.set(urge.part.id, {
    early: Math.min(1, early + seconds / urge.earliestS),
    late: Math.min(1, late + (Number.isFinite(urge.latestS) ? seconds / urge.latestS : 0)),
  });
}

/** Of two devices that must open at the same time the smaller goes first; a residual one before an overcurrent one. */
const rank = ({ part, astrayAmps }: Urge): number => {
  if (part.kind === 'rcd' || (part.kind === 'rcbo' && astrayAmps > 0)) return 0;
  return 'rating' in part && part.rating !== undefined ? part.rating : Infinity;
};

/** The device that opens first at the latest. */
export const firstOf = (pending: readonly Pending[]): Pending | undefined =>
  pending
    .filter(({ lateS }) => Number.isFinite(lateS))
    .sort((a, b) => a.lateS - b.lateS || rank(a.urge) - rank(b.urge) || byDesignation(a.urge.part, b.urge.part))[0];
