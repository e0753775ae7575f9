import Link from 'next/link';
import type { ComponentProps, ReactNode } from 'react';
import { Stamp } from '@/components/ui/stamp';
import type { RuleMeta } from '@/diagram/rules/types';
import { LessonSection } from './lesson-section';
import { GROUPS, SEVERITY, clauseWords, practiceWords } from './words';

const link = 'text-ink underline underline-offset-[3px]';

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="border-t-2 border-ink pt-3">
      <h2 className="mb-1 text-head font-bold">{title}</h2>
      <div className="max-w-[760px] text-[14px] leading-[22px]">{children}</div>
    </section>
  );
}

interface RulePageProps {
  meta: RuleMeta;
  lesson: ComponentProps<typeof LessonSection>;
  before?: RuleMeta;
  after?: RuleMeta;
}

/** A rule as a lesson: what happens and to whom, how it looks on the sheet, what to do, what it leans on. */
export function RulePage({ meta, lesson, before, after }: RulePageProps) {
  return (
    <article className="flex max-w-[1120px] flex-col gap-6 px-4 pt-4 pb-6 lap:px-6">
      <header>
        <p className="text-grey">
          <Link href="/rules" className={link}>
            Rules
          </Link>
          , {GROUPS[meta.group]}
        </p>
        <h1 className="mt-2 text-title font-bold">{meta.title}</h1>
        <p className="mt-2 flex flex-wrap items-center gap-x-4 gap-y-1">
          <Stamp shape={SEVERITY[meta.severity].shape}>{meta.severity}</Stamp>
          <span className="text-grey">{meta.id}</span>
          <span className="text-grey">{practiceWords(meta)}</span>
        </p>
      </header>
      <Part title="What happens">{meta.lesson}</Part>
      <LessonSection {...lesson} />
      <Part title="What to do">{meta.remedy}</Part>
      <Part title="Leans on">
        {meta.clauses.length === 0 ? (
          <p>Common practice; no clause is cited.</p>
        ) : (
          <ul>
            {meta.clauses.map((clause) => (
              <li key={clauseWords(clause)}>
                {clauseWords(clause)}
                {clause.memory && clause.clause && <span className="text-grey"> (from memory)</span>}
              </li>
            ))}
          </ul>
        )}
      </Part>
      <nav
        aria-label="Rules beside this one"
        className="flex flex-wrap justify-between gap-4 border-t border-rule pt-3"
      >
        {before ? (
          <Link href={`/rules/${before.id}`} className={link}>
            ← {before.title}
          </Link>
        ) : (
          <span />
        )}
        {after && (
          <Link href={`/rules/${after.id}`} className={`${link} text-right`}>
            {after.title} →
          </Link>
        )}
      </nav>
    </article>
  );
}
