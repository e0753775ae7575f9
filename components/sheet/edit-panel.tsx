'use client';

import { useId, useRef, useLayoutEffect, useState, type KeyboardEvent } from 'react';
import { editCable, editName, editRatings, sharedRating } from '@/diagram/commands/edit-in-place';
import { placeExactly, placeText } from '@/diagram/commands/move-parts';
import { cableText, ratingExample } from '@/diagram/commands/rating-text';
import { isRefusal, type Command, type Refusal } from '@/diagram/commands/types';
import { listNames, nameOf } from '@/diagram/document/names';
import { KIND_NAME } from '@/diagram/document/kinds';
import { Button } from '@/components/ui/button';
import type { Hands } from './hands';
import { REST, type Mode } from './view';

interface FieldProps {
  label: string;
  value: string;
  hint?: string;
  first?: boolean;
  /** does the edit; what is refused stays in the field with the reason below */
  commit(text: string): Command | Refusal;
  hands: Hands;
  onDone(): void;
}

function EditField({ label, value, hint, first = false, commit, hands, onDone }: FieldProps) {
  const id = useId();
  const [text, setText] = useState(value);
  const [error, setError] = useState('');
  const field = useRef<HTMLInputElement>(null);
  const left = useRef(false);
  useLayoutEffect(() => {
    if (first) field.current?.select();
  }, [first]);
  /** @returns true when the field is as it should be */
  const take = (): boolean => {
    if (text.trim() === value || left.current) return true;
    const outcome = commit(text);
    if (isRefusal(outcome)) {
      setError(outcome.refused);
      hands.store.getState().say(outcome.refused);
      return false;
    }
    hands.do(outcome);
    return true;
  };
  const leave = () => {
    // The focus goes with the panel: what it leaves behind is not taken.
    left.current = true;
    onDone();
  };
  const onKeyDown = (event: KeyboardEvent) => {
    event.stopPropagation();
    if (event.key === 'Escape') leave();
    else if (event.key === 'Enter' && !event.nativeEvent.isComposing && take()) leave();
    else if (event.key === 'Tab' && !take()) event.preventDefault();
  };
  return (
    <div>
      <label className="block text-small text-grey" htmlFor={id}>
        {label}
      </label>
      <input
        id={id}
        ref={field}
        dir="auto"
        aria-describedby={error ? `${id}-why` : undefined}
        value={text}
        onChange={(event) => {
          setText(event.target.value);
          setError('');
        }}
        onKeyDown={onKeyDown}
        onBlur={take}
        placeholder={hint}
        aria-invalid={error ? true : undefined}
        className="w-full border-b border-ink bg-transparent px-1 font-bold outline-offset-0 placeholder:font-normal placeholder:text-grey aria-invalid:border-b-2 aria-invalid:border-red pointer-coarse:min-h-11"
        autoComplete="off"
        spellCheck={false}
      />
      {error && (
        <p id={`${id}-why`} role="alert" className="text-small text-red">
          {error}
        </p>
      )}
    </div>
  );
}

/** The lettering of a part or cable, open for writing at its place. */
export function EditPanel({
  mode,
  hands,
  onDone,
}: {
  mode: Extract<Mode, { kind: 'edit' }>;
  hands: Hands;
  onDone(): void;
}) {
  const part = hands.doc.parts.find((candidate) => candidate.id === mode.part);
  const ids = mode.parts ?? (part ? [part.id] : []);
  const many = ids.length > 1;
  const { face } = hands.view.getState();
  const cable = hands.doc.cables.find((candidate) => candidate.id === mode.cable);
  const leave = () => {
    hands.view.getState().setMode(REST);
    onDone();
  };
  if (!part && !cable) return null;
  const chosen = hands.doc.parts.filter((candidate) => ids.includes(candidate.id));
  const one = part ? (part.ref ?? KIND_NAME[part.kind]) : 'the cable';
  const name = many ? listNames(chosen.map((candidate) => nameOf(hands.doc, candidate)), 4) : one;
  return (
    <div
      role="dialog"
      aria-label={`Edit ${name}`}
      className="flex w-56 flex-col gap-2 border-2 border-ink bg-paper p-2"
      onKeyDown={(event) => event.stopPropagation()}
    >
      {part && (
        <>
          <EditField
            first={mode.field === undefined}
            label={`Rating of ${name}`}
            value={sharedRating(hands.doc, ids)}
            hint={ratingExample(part)}
            commit={(text) => editRatings(hands.doc, ids, text)}
            hands={hands}
            onDone={leave}
          />
        </>
      )}
      {part && !many && (
        <>
          <EditField
            label="Designation"
            value={part.ref ?? ''}
            commit={(text) => editName(hands.doc, part.id, 'ref', text)}
            hands={hands}
            onDone={leave}
          />
          <EditField
            label="Label"
            value={part.label ?? ''}
            commit={(text) => editName(hands.doc, part.id, 'label', text)}
            hands={hands}
            onDone={leave}
          />
          {placeText(hands.doc, face, part.id) !== '' && (
            <EditField
              first={mode.field === 'place'}
              label="Place, mm across and down"
              value={placeText(hands.doc, face, part.id)}
              hint="125, 62.5"
              commit={(text) => placeExactly(hands.doc, face, part.id, text)}
              hands={hands}
              onDone={leave}
            />
          )}
        </>
      )}
      {cable && (
        <EditField
          first
          label="Cable"
          value={cableText(cable)}
          hint="3×2.5 24 m"
          commit={(text) => editCable(hands.doc, cable.id, text)}
          hands={hands}
          onDone={leave}
        />
      )}
      <p className="text-small text-grey pointer-coarse:hidden">Enter takes, Esc leaves as it was.</p>
      <Button
        className="not-pointer-coarse:hidden"
        solid
        onClick={({ currentTarget }) => {
          // The field that lost the focus to this has taken its text, or says why not.
          if (!currentTarget.parentElement!.querySelector('[aria-invalid]')) leave();
        }}
      >
        Take it
      </Button>
    </div>
  );
}
