'use client';

import type { ActionContext } from '@/components/sheet/actions';
import type { Hands } from '@/components/sheet/hands';
import { ListPanel } from '@/components/sheet/lists';
import { marksOf } from '@/diagram/commands/ends';
import { fitsWords } from '@/diagram/commands/extend/catalogue';
import { allowedFrom, joinTerminals } from '@/diagram/commands/join-terminals';
import type { End } from '@/diagram/document/schema';
import type { OutlineItem } from '@/diagram/outline/types';
import { endWords } from '@/diagram/outline/words';
import type { Remedy } from '@/diagram/rules/types';
import { commandsFor } from './item-commands';

const fits = (words: string, typed: string): boolean => typed.trim() === '' || fitsWords(words, typed.trim());

interface ItemCommandsProps {
  item: OutlineItem;
  context: ActionContext;
  remedies: readonly Remedy[];
  onWire(): void;
  onLeave(): void;
}

/** What can be done with the line in hand, to be narrowed by typing. */
export function ItemCommands({ item, context, remedies, onWire, onLeave }: ItemCommandsProps) {
  const { hands } = context;
  const commands = commandsFor(item, context, {
    takeAll: () => hands.store.getState().select({ parts: item.parts, wires: item.wires, terminal: null }),
    show: () => {
      if (item.parts[0]) hands.goTo(item.parts[0]);
      context.toSheet();
    },
    askWire: onWire,
    remedies,
  });
  return (
    <ListPanel
      label={`What can be done: ${item.words}`}
      placeholder="What do you want to do with it?"
      items={(typed) => commands.filter((command) => fits(command.words, typed))}
      onLeave={onLeave}
      onPick={(id) => {
        onLeave();
        commands.find((command) => command.id === id)?.does();
      }}
    />
  );
}

/** Terminals that a wire may go to from the one in hand: those of its own room first, as they are said. */
export function WireList({ hands, from, onLeave }: { hands: Hands; from: End; onLeave(): void }) {
  const { doc } = hands;
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  const here = parts.get(from[0])?.place;
  const ends = doc.parts.flatMap((part) => marksOf(doc, part).map((mark): End => [part.id, mark]));
  const far = ([id]: End): number => Number(parts.get(id)?.place !== here);
  const allowed = allowedFrom(doc, from, ends).sort((a, b) => far(a) - far(b));
  const items = allowed.map((end, i) => {
    const part = parts.get(end[0]);
    const place = doc.places.find((candidate) => candidate.id === part?.place)?.name;
    return { id: String(i), words: endWords(doc, part, end[0], end[1]), ...(place && { detail: place }) };
  });
  return (
    <ListPanel
      label={`Wire from ${endWords(doc, parts.get(from[0]), from[0], from[1])} to which terminal?`}
      placeholder="A part, its terminal, or a room"
      items={(typed) => items.filter((item) => fits(`${item.words} ${item.detail ?? ''}`, typed))}
      onLeave={onLeave}
      onPick={(id) => {
        onLeave();
        const to = allowed[Number(id)];
        if (to) hands.do(joinTerminals(doc, from, to, hands.newId));
      }}
    />
  );
}
