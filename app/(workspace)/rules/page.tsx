import type { Metadata } from 'next';
import { RuleList } from '@/components/rules/rule-list';
import { RulesSheet } from '@/components/rules/rules-sheet';
import { rules } from '@/diagram/rules';
import { requireActor } from '@/lib/server/session';
import { today } from '../today';

export const metadata: Metadata = { title: 'Rules' };

export default async function RulesPage() {
  const actor = await requireActor();
  return (
    <RulesSheet person={{ initials: actor.initials, roles: actor.roles }} team={actor.team} today={today()} title="Catalogue of rules" find>
      <RuleList metas={rules.map(({ meta }) => meta)} />
    </RulesSheet>
  );
}
