'use client';

import { Segmented } from '@/components/ui/segmented';
import { CONDITION_WORDS } from '@/diagram/rehearsal/say-change';
import type { ConditionName } from '@/diagram/rehearsal/stance';
import { conditionShown, useRehearsal, useRehearsalStore } from './state';

const ONLY_MAINS: readonly ConditionName[] = ['mains'];

/** The conditions as a row of switches; those that this home has not are absent, not grey. */
export function ConditionsRow({ named = true }: { named?: boolean }) {
  const store = useRehearsalStore();
  const conditions = useRehearsal((state) => state.answer?.conditions ?? ONLY_MAINS);
  const condition = useRehearsal((state) => conditionShown(state));
  return (
    <Segmented
      label="Condition"
      showLabel={named}
      segments={conditions.map((value) => ({ value, label: CONDITION_WORDS[value] }))}
      value={condition}
      onChange={(name) => store.getState().setCondition(name)}
    />
  );
}
