import Link from 'next/link';
import type { ReactNode } from 'react';
import { jobTabs } from '@/components/frame/tabs';
import type { JobRow } from '@/lib/shared/jobs';
import { findingCount, findingWords } from './words';

/** A sheet in small: not its drawing, but how it looks from afar, so that the eye finds it. */
const pictures: Record<string, ReactNode> = {
  survey: (
    <g className="stroke-rule" strokeWidth="1">
      {[14, 22, 30, 38, 46].map((y) => (
        <path key={y} d={`M12 ${y}H100`} />
      ))}
      <path d="M36 10V50M66 10V50" />
    </g>
  ),
  overview: (
    <g className="stroke-ink" strokeWidth="1">
      <path d="M44 8V22" />
      <path d="M12 22H84" strokeWidth="2" />
      {[16, 29, 42, 55, 68, 80].map((x) => (
        <path key={x} d={`M${x} 22V34M${x - 4} 34h9v13h-9z`} />
      ))}
      <path d="M12 56H62M12 59H62" />
    </g>
  ),
  connections: (
    <g className="stroke-ink" strokeWidth="1">
      {[18, 40, 62, 84].map((x) => (
        <path key={x} d={`M${x} 8V18M${x - 6} 18h12v14h-12zM${x} 32V54`} />
      ))}
      <path d="M14 50H96" strokeDasharray="5 2" />
    </g>
  ),
  schedules: (
    <g className="stroke-ink" strokeWidth="1">
      <path d="M14 10V40" strokeWidth="2" />
      {[14, 21, 28, 35].map((y) => (
        <path key={y} d={`M14 ${y}H26M32 ${y}H100`} />
      ))}
      <path d="M16 46V62H52M20 50C24 58 34 60 50 61" />
    </g>
  ),
  rehearsal: (
    <g className="stroke-ink" strokeWidth="1">
      <path d="M20 10V20M20 20H58" strokeDasharray="1 2" />
      <path d="M28 20V40M46 20V40" strokeDasharray="1 2" />
      <path d="M60 46V28H96V46M63 46V31H93V46" />
      <circle cx="28" cy="44" r="4" strokeDasharray="1 2" />
      <circle cx="61.5" cy="51" r="4" />
      <circle cx="94.5" cy="51" r="4" />
      <path d="M12 61H56M20 59V63M34 59V63M48 59V63" />
    </g>
  ),
};

function stateOf(job: JobRow, sheet: string): { words: string; red: boolean } {
  if (sheet !== 'overview') return { words: '', red: false };
  const count = findingCount(job);
  return { words: count === null || count === 0 ? findingWords(job) : `${count} ${count === 1 ? 'finding' : 'findings'}`, red: !!job.findings?.danger };
}

interface SetOfSheetsProps {
  job: JobRow;
  /** id of the sheet in hand */
  inHand: string;
  /** says which sheet a link leads to before the browser follows it */
  onChoose(sheet: string): void;
}

/** The set of one job as it lies on the desk: only sheets that exist. */
export function SetOfSheets({ job, inHand, onChoose }: SetOfSheetsProps) {
  const sheets = jobTabs(job.id).filter((tab) => tab.number !== undefined);
  return (
    <ul className="grid grid-cols-2 gap-x-4 gap-y-3 sm:flex sm:gap-[18px]">
      {sheets.map((tab) => {
        const open = tab.id === inHand;
        const { words, red } = stateOf(job, tab.id);
        return (
          <li key={tab.id}>
            <Link href={tab.href} className="block text-ink no-underline" onFocus={() => onChoose(tab.id)}>
              <svg viewBox="0 0 116 76" className="block h-[76px] w-[116px] max-w-full" aria-hidden="true" fill="none">
                <path d="M4 4H116V76H4z" className="fill-desk" />
                <path d="M1.5 1.5H112V72H1.5z" className="fill-paper stroke-ink" strokeWidth={open ? 2.6 : 1} />
                <path d="M5 5H108V68H5zM64 68V57H108" className="stroke-rule" strokeWidth="1" />
                {pictures[tab.id]}
              </svg>
              <span className={`mt-1 block ${open ? 'font-bold' : ''}`}>
                {tab.number} {tab.label}
              </span>
              <span className={`block min-h-4 text-small ${red ? 'text-red' : 'text-grey'}`}>{words}</span>
            </Link>
          </li>
        );
      })}
    </ul>
  );
}
