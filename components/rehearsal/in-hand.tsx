'use client';

import { Segmented } from '@/components/ui/segmented';
import { ratingText } from '@/diagram/commands/rating-text';
import { KIND_NAME } from '@/diagram/document/kinds';
import type { Installation, Part } from '@/diagram/document/schema';
import type { Rehearsed } from '@/diagram/rehearsal/rehearse';
import { sayIsolation, sayStillLive, type Said } from '@/diagram/rehearsal/say-open';
import { settingsOf, settingWord } from '@/diagram/rehearsal/settings';
import type { Figures } from '@/diagram/rehearsal/figures';
import { ampText, partName, voltText } from '@/diagram/rehearsal/words';
import { FaultChoice } from './fault-choice';
import { useRehearsalStore } from './state';

interface InHandProps {
  document: Installation;
  part: Part;
  answer: Rehearsed;
  /** of the station shown */
  figures: Figures;
}

const Sentences = ({ said }: { said: readonly Said[] }) => (
  <ul className="mt-1 flex flex-col gap-1">
    {said.map(({ text, grave }) => (
      <li key={text} className={grave ? 'border-l-2 border-red pl-2 font-semibold' : 'pl-[10px]'}>
        {text}
      </li>
    ))}
  </ul>
);

/** How the part stands now, in a line. */
function standsWords(part: Part, figures: Figures, nameOf: (id: string) => string): string {
  const now = figures.parts[part.id];
  if (!now) return '';
  const from = now.from.length > 0 ? ` from ${now.from.map(nameOf).join(' and ')}` : '';
  const state = { live: `live${from}`, dead: 'dead, 0 V', return: 'the way back of something live', plain: 'earth' }[
    now.state
  ];
  const load = now.load && `${voltText(now.load.volts)}, ${ampText(now.load.amps)}${now.load.works ? ', at work' : ''}`;
  const shell = now.caseVolts !== undefined && now.caseVolts > 1 ? `case at ${voltText(now.caseVolts)}` : undefined;
  return [state, load, shell].filter(Boolean).join('; ');
}

/** What is in hand: how it stands, what it is put to, what stays live when it is opened, how it is made dead. */
export function InHand({ document, part, answer, figures }: InHandProps) {
  const store = useRehearsalStore();
  const settings = settingsOf(part);
  const nameOf = (id: string) => {
    const found = document.parts.find((each) => each.id === id);
    return found ? partName(document, found) : id;
  };
  const name = nameOf(part.id);
  const place = document.places.find(({ id }) => id === part.place)?.name;
  const hand = answer.hand?.stillLive.part === part.id ? answer.hand : null;
  const isolation = hand && sayIsolation(document, hand.isolation);
  const setting = hand?.stillLive.setting;
  const question =
    setting === null || setting === undefined
      ? `What is live in ${name}?`
      : hand?.stillLive.already
        ? `What is live with ${name} ${settingWord(part, setting)}?`
        : `What stays live with ${name} ${settingWord(part, setting)}?`;
  return (
    <section aria-label={`${name}, in hand`} className="flex flex-col gap-3">
      <div>
        <h2 className="text-head font-bold">
          {name}
          <span className="ml-2 font-normal text-grey">
            {[part.ref && KIND_NAME[part.kind], ratingText(part)].filter(Boolean).join(' ')}
          </span>
        </h2>
        <p className="text-grey">{[part.label, place].filter(Boolean).join(', ')}</p>
        <p>{standsWords(part, figures, nameOf)}</p>
      </div>
      {settings.length > 0 && (
        <Segmented
          label={`${name} stands`}
          segments={settings.map((value) => ({ value, label: settingWord(part, value) }))}
          value={answer.settings[part.id] ?? settings[0]!}
          onChange={(value) => store.getState().operate(part.id, value)}
        />
      )}
      <FaultChoice part={part} name={name} />
      {hand && (
        <div>
          <h3 className="font-bold">{question}</h3>
          <Sentences said={sayStillLive(document, hand.stillLive)} />
        </div>
      )}
      {isolation && (
        <div>
          <h3 className="font-bold">To make {name} dead</h3>
          {isolation.steps.length > 0 && (
            <ol className="mt-1 flex list-decimal flex-col gap-1 pl-6">
              {isolation.steps.map((step) => (
                <li key={step}>{step}</li>
              ))}
            </ol>
          )}
          <Sentences said={isolation.cautions} />
        </div>
      )}
    </section>
  );
}
