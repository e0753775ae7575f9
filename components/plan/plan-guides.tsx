import type { Guide, Guided } from '@/diagram/layout/guides';

const pathOf = ({ upright, at, from, to }: Guide): string =>
  upright ? `M${at} ${from}V${to}` : `M${from} ${at}H${to}`;

/** What is moved comes to stand in line with: thin lines at every zoom. */
export function PlanGuides({ guided: { lines, gaps }, suspended }: { guided: Guided; suspended: boolean }) {
  if (suspended) return null;
  return (
    <g pointerEvents="none" fill="none" className="stroke-blue" strokeWidth={1.2}>
      {lines.map((line) => (
        <path key={pathOf(line)} data-guide="line" d={pathOf(line)} vectorEffect="non-scaling-stroke" />
      ))}
      {gaps.map((gap) => (
        <path key={pathOf(gap)} data-guide="gap" d={pathOf(gap)} strokeDasharray="3 3" vectorEffect="non-scaling-stroke" />
      ))}
    </g>
  );
}
