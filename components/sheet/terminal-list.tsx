'use client';

import { useMemo } from 'react';
import { compareDesignations, nameOf } from '@/diagram/document/names';
import type { End, Installation, Wire } from '@/diagram/document/schema';
import type { Hands } from './hands';
import { useSheet } from './use-drawing';

interface Row {
  wire: Wire;
  from: string;
  to: string;
  cable: string;
}

const CORE: Partial<Record<Wire['role'], string>> = { neutral: 'N', earth: 'PE' };

/** "S1.2"; a joint, which has no designation, by its conductor. */
const endName = (doc: Installation, [id, mark]: End, role: Wire['role']): string => {
  const part = doc.parts.find((candidate) => candidate.id === id);
  if (!part) return `${id}.${mark} is not drawn`;
  if (part.kind === 'joint') return `joint ${CORE[role] ?? 'L'}.${mark}`;
  if (part.kind === 'line-bar' || part.kind === 'bond') return `${part.kind === 'bond' ? 'bond' : 'line bar'}.${mark}`;
  return `${nameOf(doc, part)}.${mark}`;
};

function rowsOf(doc: Installation, place: string): Row[] {
  const here = new Set(doc.parts.filter((part) => (part.place ?? '') === place).map((part) => part.id));
  const cables = new Map(doc.cables.map((cable) => [cable.id, cable]));
  return doc.wires
    .filter((wire) => here.has(wire.from[0]) || here.has(wire.to[0]))
    .map((wire) => {
      const own = here.has(wire.from[0]) ? wire.from : wire.to;
      const other = own === wire.from ? wire.to : wire.from;
      const csa = wire.cable ? cables.get(wire.cable)?.csa : undefined;
      return {
        wire,
        from: endName(doc, own, wire.role),
        to: endName(doc, other, wire.role),
        cable: [wire.colour, csa].filter(Boolean).join(' '),
      };
    })
    .sort((a, b) => compareDesignations(a.from, b.from) || compareDesignations(a.to, b.to));
}

/** Every core of a place by its screws, written from the drawing; the row in hand lights with its run. */
export function TerminalList({ hands, place, title }: { hands: Hands; place: string; title: string }) {
  const doc = useSheet(hands.store, (state) => state.document);
  const held = useSheet(hands.store, (state) => state.selection.wires);
  const rows = useMemo(() => rowsOf(doc, place), [doc, place]);
  return (
    <section aria-label={`Terminals of ${title}`}>
      <h2 className="text-head font-bold">Terminals of {title}</h2>
      <table className="mt-2 w-full border-t-2 border-ink">
        <thead className="sr-only">
          <tr>
            <th>Terminal</th>
            <th>To</th>
            <th>What</th>
            <th>Core</th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ wire, from, to, cable }) => {
            const inHand = held.includes(wire.id);
            return (
              <tr
                key={wire.id}
                className={`cursor-pointer border-b border-hair ${inHand ? 'bg-row font-bold' : ''}`}
                onClick={() => hands.store.getState().select({ parts: [], wires: [wire.id], terminal: null })}
              >
                <td className="py-1 pr-2">
                  <button type="button" className="text-left" aria-pressed={inHand}>
                    {from}
                  </button>
                </td>
                <td className="pr-2">{to}</td>
                <td className="pr-2 text-grey">{wire.role}</td>
                <td className="whitespace-nowrap">{cable}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
      {rows.length === 0 && <p className="mt-2 text-grey">No core ends here yet.</p>}
    </section>
  );
}
