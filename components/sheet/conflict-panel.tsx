'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { splitKey, valueAt } from '@/diagram/commands/merge';
import { ratingText } from '@/diagram/commands/rating-text';
import { KIND_NAME } from '@/diagram/document/kinds';
import { ARRANGEMENTS, type Installation, type Part } from '@/diagram/document/schema';
import { useSheet, type Me, type OpenDrawing } from './use-drawing';

const FIELD_NAME: Record<string, string> = {
  title: 'Title',
  practice: 'Practice',
  supply: 'Supply data',
  ambient: 'Ambient temperature',
  notices: 'Notices',
  silenced: 'Findings that somebody answers for',
};

/** What a place of the document is called: "Q4, mcb", "place of Q4 on the overview". */
function nameOfKey(docs: readonly Installation[], key: string): string {
  const { name, id } = splitKey(key);
  if (id === null) return FIELD_NAME[name] ?? name;
  const part = docs
    .map((doc) => doc.parts.find((candidate) => candidate.id === id))
    .find((found) => found !== undefined);
  const called = part ? `${part.ref ?? part.label ?? KIND_NAME[part.kind]}` : id;
  if ((ARRANGEMENTS as readonly string[]).includes(name)) return `Place of ${called} on the ${name}`;
  if (name === 'bends') return `Run led by hand: ${id.slice(id.indexOf(':') + 1)}`;
  if (name === 'plans')
    return `Plan: ${docs.map((doc) => doc.plans?.find((plan) => plan.id === id)?.name).find(Boolean) ?? id}`;
  if (name === 'parts') return `${called}${part?.ref ? `, ${KIND_NAME[part.kind]}` : ''}`;
  if (name === 'survey')
    return `Survey: ${docs.map((doc) => doc.survey?.find((row) => row.id === id)?.name).find(Boolean) ?? id}`;
  if (name === 'places')
    return `Place: ${docs.map((doc) => doc.places.find((place) => place.id === id)?.name).find(Boolean) ?? id}`;
  return `${name === 'wires' ? 'Wire' : 'Cable'} ${called}`;
}

const HIDDEN = new Set(['id', 'kind']);

/** A value in words; a part by its rating first. */
function words(value: unknown, other: unknown): string {
  if (value === undefined) return 'removed';
  if (typeof value !== 'object' || value === null) return String(value);
  const entries = Object.entries(value).filter(
    ([field, own]) =>
      !HIDDEN.has(field) &&
      JSON.stringify(own) !== JSON.stringify((other as Record<string, unknown> | undefined)?.[field]),
  );
  const rating = 'kind' in value ? ratingText(value as Part) : '';
  const differs = entries
    .map(([field, own]) => `${field} ${typeof own === 'object' ? JSON.stringify(own) : String(own)}`)
    .join(', ');
  return [rating, differs].filter(Boolean).join(': ') || 'kept';
}

/** Somebody and I changed the same: both side by side, decided place by place. Nothing is lost: what gives way is set aside. */
export function ConflictPanel({ drawing, me }: { drawing: OpenDrawing; me: Me }) {
  const conflict = useSheet(drawing.store, (state) => state.conflict);
  const [theirs, setTheirs] = useState<ReadonlySet<string>>(new Set());
  if (!conflict) return null;
  const others = conflict.theirs.filter((change) => change.person.id !== me.id);
  const who = [...new Set(others.map((change) => change.person.initials))].join(', ') || 'the other window';
  const docs = [conflict.myDocument, conflict.theirDocument];
  const choose = (key: string, their: boolean) => {
    const next = new Set(theirs);
    if (their) next.add(key);
    else next.delete(key);
    setTheirs(next);
  };
  return (
    <section aria-label="Changed by two" className="flex flex-col gap-3 border-l-4 border-blue pl-4">
      <h2 className="text-head font-bold text-blue">
        {others.length > 0 ? `${who} and you changed the same` : 'You changed the same in another window'}
      </h2>
      <p>Choose place by place. What gives way is set aside under History, not lost.</p>
      <ul className="flex flex-col gap-3">
        {conflict.keys.map((key) => {
          const mine = valueAt(conflict.myDocument, key);
          const other = valueAt(conflict.theirDocument, key);
          const option = (their: boolean, label: string, text: string) => (
            <label className="flex items-baseline gap-2 pointer-coarse:min-h-11">
              <input
                type="radio"
                name={key}
                className="accent-ink"
                checked={theirs.has(key) === their}
                onChange={() => choose(key, their)}
              />
              <span className="w-12 shrink-0 text-grey">{label}</span>
              <span className="min-w-0 break-words">{text}</span>
            </label>
          );
          return (
            <li key={key}>
              <fieldset>
                <legend className="font-bold">{nameOfKey(docs, key)}</legend>
                {option(false, 'mine', words(mine, other))}
                {option(true, who, words(other, mine))}
              </fieldset>
            </li>
          );
        })}
      </ul>
      <div className="flex flex-wrap gap-2">
        <Button solid onClick={() => void drawing.keeper.decide(theirs)}>
          Take as chosen
        </Button>
        <Button onClick={() => void drawing.keeper.decide(new Set())}>All mine</Button>
        <Button onClick={() => void drawing.keeper.decide(new Set(conflict.keys))}>All of {who}</Button>
      </div>
    </section>
  );
}
