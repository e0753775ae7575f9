import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { RulePage } from '@/components/rules/rule-page';
import { RulesSheet } from '@/components/rules/rules-sheet';
import { GROUPS, GROUP_ORDER } from '@/components/rules/words';
import { rules } from '@/diagram/rules';
import { lessonView } from '@/lib/server/lessons';
import { requireActor } from '@/lib/server/session';
import { today } from '../../today';

type Params = Promise<{ ruleId: string }>;

/** In the order of the catalogue: by group, then by id. */
const metas = GROUP_ORDER.flatMap((group) => rules.map(({ meta }) => meta).filter((meta) => meta.group === group));

export async function generateMetadata({ params }: { params: Params }): Promise<Metadata> {
  const { ruleId } = await params;
  return { title: metas.find(({ id }) => id === ruleId)?.title ?? 'Rule' };
}

export default async function RuleDetailPage({ params }: { params: Params }) {
  const actor = await requireActor();
  const { ruleId } = await params;
  const at = metas.findIndex(({ id }) => id === ruleId);
  const meta = metas[at];
  const lesson = meta && lessonView(meta.id);
  if (!lesson) notFound();
  return (
    <RulesSheet
      person={{ initials: actor.initials, roles: actor.roles }}
      team={actor.team}
      today={today()}
      title={meta.title}
      margin={
        <nav aria-label="Rules of this group">
          <h2 className="text-head font-bold">{GROUPS[meta.group]}</h2>
          <ul className="mt-2 flex flex-col">
            {metas
              .filter(({ group }) => group === meta.group)
              .map(({ id, title }) => (
                <li key={id}>
                  <Link
                    href={`/rules/${id}`}
                    aria-current={id === meta.id ? 'page' : undefined}
                    className={`block py-1 text-ink pointer-coarse:py-3 ${id === meta.id ? 'font-bold no-underline' : 'underline underline-offset-[3px]'}`}
                  >
                    {title}
                  </Link>
                </li>
              ))}
          </ul>
        </nav>
      }
    >
      <RulePage meta={meta} lesson={lesson} before={metas[at - 1]} after={metas[at + 1]} />
    </RulesSheet>
  );
}
