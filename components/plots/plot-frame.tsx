'use client';

import { useId, type ReactNode } from 'react';

export interface PlotFigures {
  head: readonly string[];
  /** the first of each row is its heading */
  rows: readonly (readonly string[])[];
}

interface PlotFrameProps {
  title: string;
  /** grey, behind the title: "log, log" */
  aside?: ReactNode;
  /** what the picture says */
  words: readonly string[];
  figures: PlotFigures;
  /** the picture; hidden from screen readers, who have the words and the figures */
  children: ReactNode;
  /** beside the picture: switches */
  controls?: ReactNode;
  level?: 2 | 3;
}

/** A picture of figures: what it says in a sentence, the picture, and the figures themselves on demand. */
export function PlotFrame({ title, aside, words, figures, children, controls, level = 2 }: PlotFrameProps) {
  const id = useId();
  const Heading = `h${level}` as const;
  return (
    <section aria-labelledby={id} className="min-w-0 break-inside-avoid">
      <Heading id={id} className="font-bold">
        {title} {aside && <span className="ml-3 font-normal text-grey">{aside}</span>}
      </Heading>
      <div aria-hidden="true" className="mt-1">
        {children}
      </div>
      {words.map((sentence) => (
        <p key={sentence} className="mt-1">
          {sentence}
        </p>
      ))}
      {controls}
      <details className="mt-1 print:hidden">
        <summary className="cursor-pointer text-small text-grey pointer-coarse:min-h-11">The same as figures</summary>
        <div className="overflow-x-auto" tabIndex={0} role="region" aria-label={`${title}: figures`}>
          <table className="mt-1 border-collapse">
            <thead>
              <tr className="text-small text-grey">
                {figures.head.map((name, i) => (
                  <th key={name} scope="col" className={`pr-6 font-normal ${i === 0 ? 'text-left' : 'text-right'}`}>
                    {name}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody className="tabular-nums">
              {figures.rows.map(([name, ...values], i) => (
                <tr key={`${name} ${i}`}>
                  <th scope="row" className="pr-6 text-left font-normal whitespace-nowrap">
                    {name}
                  </th>
                  {values.map((value, j) => (
                    <td key={j} className="pr-6 text-right whitespace-nowrap">
                      {value}
                    </td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      </details>
    </section>
  );
}
