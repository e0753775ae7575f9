import { STROKE } from '@/diagram/symbols/types';

const WIDTH = 40;

/** How live, dead and at work are told apart on this sheet: by stroke, never by colour alone. */
const items = [
  { words: 'mains', picture: <path d={`M0 7H${WIDTH}`} strokeWidth={2} /> },
  {
    words: 'battery, cased',
    picture: (
      <>
        <path d={`M0 7H${WIDTH}`} strokeWidth={8.4} />
        <path d={`M0 7H${WIDTH}`} strokeWidth={5.2} stroke="var(--paper)" />
      </>
    ),
  },
  {
    words: 'dead, 0 V',
    picture: (
      <path d={`M2 7H${WIDTH}`} stroke="var(--grey)" strokeWidth={2} strokeDasharray="0.4 4" strokeLinecap="round" />
    ),
  },
  {
    words: 'at work',
    picture: (
      <g fill="none" strokeWidth={STROKE.normal / 20}>
        <circle cx={WIDTH / 2} cy={7} r={6.2} />
        <circle cx={WIDTH / 2} cy={7} r={3.8} />
      </g>
    ),
  },
] as const;

export function RehearsalLegend() {
  return (
    <ul aria-label="Legend" className="grid grid-cols-2 content-start gap-x-4 gap-y-1 max-lap:hidden">
      {items.map(({ words, picture }) => (
        <li key={words} className="flex items-center gap-2 text-small leading-[14px] whitespace-nowrap">
          <svg width={WIDTH} height={14} stroke="var(--ink)" aria-hidden="true" className="shrink-0">
            {picture}
          </svg>
          {words}
        </li>
      ))}
    </ul>
  );
}
