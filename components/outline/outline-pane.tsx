'use client';

import { useCallback, useEffect, useRef, useState, type KeyboardEvent, type MouseEvent } from 'react';
import { actionFor, keyName, type ActionContext } from '@/components/sheet/actions';
import { useProof } from '@/components/sheet/margin/use-proof';
import { useSheet } from '@/components/sheet/use-drawing';
import { useViewStore } from '@/components/sheet/view';
import { Button } from '@/components/ui/button';
import { findingKey } from '@/diagram/outline/findings-at';
import { treeMove, typeAhead, type TreeKey } from '@/diagram/outline/rows';
import type { Finding } from '@/diagram/rules/types';
import { ItemCommands, WireList } from './item-lists';
import { TreeRow } from './tree-row';
import { useOutline } from './use-outline';

interface OutlinePaneProps {
  context: ActionContext;
  findings: readonly Finding[];
  /** is given a function that puts the focus on the line in hand; null when the outline closes */
  onReady(focus: (() => void) | null): void;
  onClose(): void;
}

const TREE_KEYS: ReadonlySet<string> = new Set(['ArrowUp', 'ArrowDown', 'ArrowLeft', 'ArrowRight', 'Home', 'End', '*']);
/** ms within which letters belong to one word */
const ONE_WORD = 900;

/** The drawing as a tree that is walked and edited by keys alone, beside the canvas, with the same things in hand. */
export function OutlinePane({ context, findings, onReady, onClose }: OutlinePaneProps) {
  const { hands } = context;
  const view = useViewStore();
  const outline = useOutline(hands, findings);
  const { rows, at, selection } = outline;
  const [listing, setListing] = useState<'commands' | 'wire' | null>(null);
  const tree = useRef<HTMLUListElement>(null);
  const typed = useRef({ text: '', at: 0 });
  const document = useSheet(hands.store, (state) => state.document);
  const finding = findings.find((candidate) => findingKey(candidate) === at.item.finding) ?? null;
  const proof = useProof(document, finding);

  const focus = useCallback(() => tree.current?.querySelector<HTMLElement>('[tabindex="0"]')?.focus(), []);
  useEffect(() => {
    onReady(focus);
    focus();
    return () => onReady(null);
  }, [onReady, focus]);
  useEffect(() => {
    const row = tree.current?.querySelector<HTMLElement>('[tabindex="0"]');
    const { activeElement, body } = window.document;
    // A line that goes with what it stood for takes the focus with it: the line that stands in for it has it then.
    const lost = activeElement === body && view.getState().outline.hand;
    if (lost || tree.current?.contains(activeElement)) row?.focus();
    else row?.scrollIntoView({ block: 'nearest' });
  }, [at.item.key, view]);

  const leaveList = () => {
    setListing(null);
    // What the list has opened keeps the focus; where it opened nothing, the line in hand takes it back.
    requestAnimationFrame(() => {
      const { activeElement, body } = window.document;
      if (!activeElement || activeElement === body) focus();
    });
  };

  const byKey = (key: string) => rows.find((row) => row.item.key === key);
  const rowUnder = (event: MouseEvent) =>
    byKey((event.target as Element).closest<HTMLElement>('[data-key]')?.dataset.key ?? '');
  const onClick = (event: MouseEvent) => {
    const row = rowUnder(event);
    if (!row) return;
    const { key } = row.item;
    if (row.expanded !== null && (event.target as Element).closest('[data-fold]'))
      outline.move(row.expanded ? { to: key, fold: key } : { to: key, unfold: [key] });
    else if (event.ctrlKey || event.metaKey) outline.toggle(row.item);
    else outline.move({ to: key });
    requestAnimationFrame(focus);
  };

  /** @returns true where the key was the outline's */
  const act = (event: KeyboardEvent): boolean => {
    const ctrl = event.ctrlKey || event.metaKey;
    const { key } = event;
    if (TREE_KEYS.has(key) && !ctrl) {
      const move = treeMove(rows, at.item.key, key as TreeKey);
      if (move && event.shiftKey && (key === 'ArrowUp' || key === 'ArrowDown')) {
        const held = hands.store.getState().selection;
        outline.move(move);
        hands.store.getState().select(held);
        const item = byKey(move.to)?.item;
        if (item) outline.toggle(item);
      } else if (move) outline.move(move);
      return true;
    }
    if (key === 'Enter' || key === 'ContextMenu' || (key === 'F10' && event.shiftKey)) setListing('commands');
    else if (key === 'Escape') onClose();
    else if (key === 'F2') actionFor('Enter')?.does(context);
    else if (key === ' ' && typed.current.text === '') outline.toggle(at.item);
    else if (ctrl || key === 'Delete' || key === 'Backspace') {
      const action = actionFor(keyName(event.nativeEvent));
      if (!action) return false;
      action.does(context);
    } else if (key.length === 1 && !event.altKey && (/[\p{L}\p{N}]/u.test(key) || typed.current.text !== '')) {
      const grown = typed.current.text + key;
      typed.current = { text: grown, at: event.timeStamp };
      const to = typeAhead(rows, at.item.key, grown);
      if (to) outline.move({ to });
    } else return false;
    return true;
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.nativeEvent.isComposing || !tree.current?.contains(event.target as Node)) return;
    // Any key that writes nothing ends the word, and so does waiting.
    if ((event.key.length > 1 && event.key !== 'Shift') || event.timeStamp - typed.current.at >= ONE_WORD) typed.current = { text: '', at: 0 };
    if (!act(event)) return;
    event.preventDefault();
    event.stopPropagation();
  };

  const held = new Set([...selection.parts.map((id) => `part ${id}`), ...selection.wires.map((id) => `wire ${id}`)]);
  const isHeld = (row: (typeof rows)[number]): boolean => {
    const { item } = row;
    if (item.kind === 'wire') return held.has(`wire ${item.wires[0]}`);
    if (item.terminal) return selection.terminal?.join(' ') === item.terminal.join(' ');
    return (item.kind === 'part' || item.kind === 'way') && held.has(item.key);
  };
  return (
    <section
      aria-label="Outline"
      className="absolute inset-0 z-[8] flex flex-col border-rule bg-paper md:static md:w-[320px] md:shrink-0 md:border-r lap:w-[380px]"
      onFocus={() => {
        const { outline: now } = view.getState();
        if (!now.hand) view.getState().set({ outline: { ...now, hand: true } });
      }}
      onKeyDown={onKeyDown}
    >
      <div className="flex items-center gap-2 border-b border-ink px-3 py-1">
        <h2 className="flex-1 text-head font-bold">Outline</h2>
        <Button aria-haspopup="dialog" onClick={() => setListing('commands')}>
          What can be done
        </Button>
        <Button onClick={onClose}>Close</Button>
      </div>
      {listing === 'commands' && (
        <ItemCommands
          item={at.item}
          context={context}
          remedies={proof?.remedies ?? []}
          onWire={() => setListing('wire')}
          onLeave={leaveList}
        />
      )}
      {listing === 'wire' && selection.terminal && (
        <WireList hands={hands} from={selection.terminal} onLeave={leaveList} />
      )}
      <ul
        ref={tree}
        role="tree"
        aria-label={`Outline of ${document.title}`}
        aria-multiselectable="true"
        className="min-h-0 flex-1 overflow-y-auto"
        onClick={onClick}
        onDoubleClick={(event) => rowUnder(event) && setListing('commands')}
      >
        {rows.map((row) => (
          <TreeRow
            key={row.item.key}
            row={row}
            inHand={row === at}
            selected={isHeld(row)}
          />
        ))}
      </ul>
      <p className="border-t border-rule px-3 py-1 text-small text-grey max-lap:hidden">
        Enter: what can be done. Letters go to a line. Space takes several in hand. Esc: the sheet.
      </p>
    </section>
  );
}
