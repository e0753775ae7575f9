import type { ReactNode } from 'react';

export type NoteTone = 'finding' | 'person' | 'plain';

interface NoteProps {
  tone?: NoteTone;
  /** the note in hand has the thick stroke */
  inHand?: boolean;
  /** ties the note to its place on the sheet */
  letter?: string;
  heading: ReactNode;
  children?: ReactNode;
  /** the grey line: severity, conditions, place */
  meta?: ReactNode;
  actions?: ReactNode;
  level?: 2 | 3 | 4;
}

const stroke: Record<NoteTone, string> = { finding: 'border-red', person: 'border-blue', plain: 'border-ink' };
const word: Record<NoteTone, string> = { finding: 'text-red', person: 'text-blue', plain: 'text-ink' };

/** A note in the margin: a pencil stroke, not a box. */
export function Note({ tone = 'plain', inHand = false, letter, heading, children, meta, actions, level = 3 }: NoteProps) {
  const Heading = `h${level}` as const;
  return (
    <section className={`${inHand ? 'border-l-4 pl-4' : 'border-l-2 pl-[18px]'} ${stroke[tone]}`}>
      <Heading className={`text-head font-bold ${word[tone]}`}>
        {letter && <span className="mr-3">{letter}</span>}
        {heading}
      </Heading>
      {children && <div className="mt-1 break-words">{children}</div>}
      {meta && <p className="mt-1 text-small text-grey">{meta}</p>}
      {actions && <div className="mt-2 flex flex-wrap gap-2">{actions}</div>}
    </section>
  );
}
