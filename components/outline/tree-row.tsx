'use client';

import { memo } from 'react';
import type { OutlineRow } from '@/diagram/outline/rows';

interface TreeRowProps {
  row: OutlineRow;
  inHand: boolean;
  selected: boolean;
}

const findingsBelow = (count: number): string => (count === 1 ? '1 finding below' : `${count} findings below`);

/** One line of the outline: folded or not, its words, its findings. The tree hears its clicks. */
export const TreeRow = memo(function TreeRow({ row, inHand, selected }: TreeRowProps) {
  const { item, level, expanded } = row;
  const below = item.keys.length - item.findings.length;
  const tone = item.kind === 'finding' ? 'text-red' : '';
  const weight = item.kind === 'way' || item.kind === 'board' || item.kind === 'sheet' ? 'font-bold' : '';
  return (
    <li
      role="treeitem"
      data-key={item.key}
      aria-level={level}
      aria-setsize={row.setSize}
      aria-posinset={row.position}
      aria-expanded={expanded ?? undefined}
      aria-selected={selected}
      tabIndex={inHand ? 0 : -1}
      className={`flex cursor-pointer items-stretch border-b border-hair pr-1 outline-offset-[-2px] [contain-intrinsic-size:auto_25px] [content-visibility:auto] ${selected ? 'bg-row' : ''}`}
      style={{ paddingLeft: `${(level - 1) * 12}px` }}
    >
      <span
        aria-hidden="true"
        className="flex w-5 shrink-0 justify-center pt-[9px] pointer-coarse:min-h-11 pointer-coarse:w-8 pointer-coarse:pt-[18px]"
        data-fold
      >
        {expanded !== null && (
          <svg width="8" height="8" viewBox="0 0 8 8" className={expanded ? 'rotate-90' : ''}>
            <path d="M2 0.5L6.5 4L2 7.5" fill="none" stroke="currentColor" strokeWidth="1.4" />
          </svg>
        )}
      </span>
      <span className={`min-w-0 flex-1 py-1 pointer-coarse:py-[14px] ${tone} ${weight}`}>
        {item.words}
        {item.findings.map((heading) => (
          <span key={heading} className="block font-normal text-red">
            {heading}
          </span>
        ))}
        {expanded === false && below > 0 && (
          <span className="block font-normal text-red">{findingsBelow(below)}</span>
        )}
      </span>
    </li>
  );
});
