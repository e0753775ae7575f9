/** A padlock, its shackle shut. */
const BODY = 'M-90 -10H90V130H-90Z';
const SHACKLE = 'M-55 -10V-65A55 55 0 0 1 55 -65V-10';

/** Marks what is held where it stands; 4 mm high. The middle of its lock is at `x`, `y`, in 1/100 mm. */
export function Padlock({ x, y, part }: { x: number; y: number; part?: string }) {
  return (
    <g data-lock={part ?? ''} transform={`translate(${x} ${y}) scale(1.7)`}>
      <path d={SHACKLE} fill="none" stroke="var(--paper)" strokeWidth={110} />
      <path d={BODY} fill="var(--grey)" stroke="var(--paper)" strokeWidth={40} />
      <path d={SHACKLE} fill="none" stroke="var(--grey)" strokeWidth={36} />
    </g>
  );
}
