'use client';

import { useRouter } from 'next/navigation';
import { jobTabs } from '@/components/frame/tabs';
import { KIND_NAME } from '@/diagram/document/kinds';
import { compareDesignations } from '@/diagram/document/names';
import { fitsWords } from '@/diagram/commands/extend/catalogue';
import { waysFor } from '@/diagram/commands/move-load';
import { ACTIONS, type ActionContext } from './actions';
import { ListPanel, type ListItem } from './lists';
import type { MarkedNote } from './margin/notes';
import { REST, type Mode } from './view';

const fits = (text: string, typed: string): boolean => typed.trim() === '' || fitsWords(text, typed.trim());

interface ListProps {
  context: ActionContext;
  onLeave(): void;
}

/** Every action by its words, with its key. */
export function CommandList({ context, onLeave }: ListProps) {
  const { hands } = context;
  const router = useRouter();
  const sheets = jobTabs(hands.store.getState().jobId);
  const turns = sheets.map(({ id, number, label }): ListItem => ({
    id: `turn ${id}`,
    words: number === undefined ? 'Turn to the list of jobs' : `Turn to sheet ${number}, ${label}`,
    ...(number !== undefined && { keys: String(number) }),
  }));
  const items = (typed: string): ListItem[] => [
    ...ACTIONS.filter(
      (action) =>
        action.id !== 'commands' &&
        action.id !== 'rest' &&
        (hands.mayEdit || !action.edits) &&
        fits(action.words, typed),
    ),
    ...turns.filter((turn) => fits(turn.words, typed)),
  ];
  return (
    <ListPanel
      label="All commands"
      placeholder="What do you want to do?"
      items={items}
      onLeave={onLeave}
      onPick={(id) => {
        hands.view.getState().setMode(REST);
        onLeave();
        const sheet = sheets.find((tab) => id === `turn ${tab.id}`);
        if (sheet) router.push(sheet.href);
        else ACTIONS.find((action) => action.id === id)?.does(context);
      }}
    />
  );
}

/** Parts and findings by name, number, kind or words. */
export function FindList({
  context,
  notes,
  onLeave,
  onNote,
}: ListProps & { notes: readonly MarkedNote[]; onNote(note: MarkedNote): void }) {
  const { hands } = context;
  const places = new Map(hands.doc.places.map((place) => [place.id, place.name]));
  const parts = hands.doc.parts
    .map((part): ListItem & { all: string } => {
      const place = part.place ? (places.get(part.place) ?? '') : '';
      const words = [part.ref, part.label, KIND_NAME[part.kind]].filter(Boolean).join(', ');
      return { id: `part ${part.id}`, words, detail: place, all: `${words} ${place} ${part.board ?? ''}` };
    })
    .sort((a, b) => compareDesignations(a.words, b.words));
  const findings = notes.map((note): ListItem & { all: string } => ({
    id: `note ${note.key}`,
    words: `${note.letter}  ${note.finding.heading}`,
    detail: note.finding.severity,
    tone: 'red',
    all: `${note.finding.heading} ${note.finding.rule.replaceAll('-', ' ')} finding ${note.finding.severity}`,
  }));
  return (
    <ListPanel
      label="Find"
      placeholder="A name, a number, a kind or a finding"
      items={(typed) => {
        const found = [...findings, ...parts].filter((item) => fits(item.all, typed));
        // A designation that is typed whole is that part, whatever is said about it.
        const exact = found.filter((item) => item.words.split(',')[0]?.toLowerCase() === typed.trim().toLowerCase());
        return [...exact, ...found.filter((item) => !exact.includes(item))].slice(0, 60);
      }}
      onLeave={onLeave}
      onPick={(id) => {
        hands.view.getState().setMode(REST);
        onLeave();
        const note = notes.find((candidate) => `note ${candidate.key}` === id);
        if (note) onNote(note);
        else hands.goTo(id.slice('part '.length));
      }}
    />
  );
}

/** The ways to which the loads in hand could move. */
export function WayList({ context, mode, onLeave }: ListProps & { mode: Extract<Mode, { kind: 'load' }> }) {
  const { hands } = context;
  const ways = waysFor(hands.doc, mode.loads[0]!);
  return (
    <ListPanel
      label="Move to which way?"
      placeholder="A way, its room, or backup"
      items={(typed) =>
        ways
          .map((way) => ({
            id: way.device,
            words: way.words,
            detail: way.backup ? 'stays on in an outage' : undefined,
          }))
          .filter((item) => fits(item.words, typed))
      }
      onLeave={onLeave}
      onPick={(device) => {
        hands.moveLoad(mode.loads, device);
        onLeave();
      }}
    />
  );
}
