import { CORE_DASH } from '@/diagram/paper/draw-scene';
import type { ReactNode } from 'react';
import type { Face, PracticeId } from '@/diagram/document/schema';
import { practices } from '@/diagram/practices';

const WIDTH = 40;

interface LineProps {
  colour: string;
  dash?: readonly [number, number];
  cased?: boolean;
}

function Line({ colour, dash, cased = false }: LineProps) {
  return (
    <svg width={WIDTH} height={12} aria-hidden="true" className="inline-block align-middle">
      {cased && <path d={`M0 6H${WIDTH}`} stroke="var(--ink)" strokeWidth={9} />}
      {cased && <path d={`M0 6H${WIDTH}`} stroke="var(--paper)" strokeWidth={6.4} />}
      <path
        d={`M0 6H${WIDTH}`}
        stroke={colour}
        strokeWidth={2.2}
        strokeDasharray={dash?.map((length) => length / 40).join(' ')}
      />
    </svg>
  );
}

/** How lines are told apart, with and without colour. On the overview a run is one line of ink, whatever its cores. */
export function coreLines(practice: PracticeId, face: Face): { words: string; line: ReactNode }[] {
  if (face === 'overview')
    return [
      { words: 'run fed by the mains', line: <Line colour="var(--ink)" /> },
      { words: 'run that stays live in an outage', line: <Line colour="var(--paper)" cased /> },
      { words: 'run of neutrals', line: <Line colour="var(--ink)" dash={CORE_DASH.N} /> },
      { words: 'run of earth', line: <Line colour="var(--ink)" dash={CORE_DASH.E} /> },
    ];
  const { colours } = practices[practice].colourSchemes[0];
  const ink = (code: string) => `var(--core-${code === 'GN' ? 'GNYE' : code})`;
  const [L, N, E] = [ink(colours.line.value[0]), ink(colours.neutral.value[0]), ink(colours.earth.value[0])];
  return [
    { words: 'L', line: <Line colour={L} /> },
    { words: 'N', line: <Line colour={N} dash={CORE_DASH.N} /> },
    { words: 'PE', line: <Line colour={E} dash={CORE_DASH.E} /> },
    { words: 'L backup', line: <Line colour={L} cased /> },
    { words: 'N backup', line: <Line colour={N} dash={CORE_DASH.N} cased /> },
  ];
}

/** The lines of the connections face, in its foot. */
export function CoreLegend({ practice }: { practice: PracticeId }) {
  return (
    <ul aria-label="Legend of lines" className="flex flex-wrap content-start gap-x-4 gap-y-1 lap:w-[232px]">
      {coreLines(practice, 'connections').map(({ words, line }) => (
        <li key={words} className="flex items-center gap-2 whitespace-nowrap text-small leading-[14px]">
          {line}
          {words}
        </li>
      ))}
    </ul>
  );
}
