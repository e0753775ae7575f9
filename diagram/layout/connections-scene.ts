import { isBar } from '../document/kinds';
import { byCode, type Installation, type Part, type Position } from '../document/schema';
import { symbolFor, terminalAt } from '../symbols';
import { barLength, barTerminal, type BarKind } from '../symbols/bar';
import { turnedSize } from '../symbols/turn';
import { traceFeeds } from '../terminals/feeds';
import { BODY } from './lettering';
import type { Scene, ScenePart, SceneRun, SceneTerminal } from './scene';
import { byIdOf } from './scene-order';
import { designation } from './wording';

export interface ConnectionPage {
  /** id of the place; '' for parts without one */
  place: string;
  name: string;
}

/** The pages of the connections face: the intake first, then the places in the document's order, each if it holds a part. */
export function connectionPages(doc: Installation): ConnectionPage[] {
  const held = new Set(doc.parts.map((part) => pageOf(doc, part)));
  const places = [...doc.places].sort((a, b) => Number(b.kind === 'intake') - Number(a.kind === 'intake') || byCode(a.id, b.id));
  const pages = places.filter((place) => held.has(place.id)).map((place) => ({ place: place.id, name: place.name }));
  return held.has('') ? [...pages, { place: '', name: 'No place yet' }] : pages;
}

function pageOf(doc: Installation, part: Part): string {
  return part.place !== undefined && doc.places.some((place) => place.id === part.place) ? part.place : '';
}

/** Parts of a page in rows, until the page has a better order. */
function rows(parts: readonly Part[], counts: Map<string, number>): Map<string, Position> {
  const positions = new Map<string, Position>();
  let x = 2000;
  let y = 4000;
  let row = 0;
  for (const part of parts) {
    const symbol = symbolFor(part, 'connections', counts.get(part.id));
    if (x + symbol.width > 40000) {
      x = 2000;
      y += row + 3000;
      row = 0;
    }
    positions.set(part.id, { x, y });
    row = Math.max(row, symbol.height);
    x += symbol.width + 2500;
  }
  return positions;
}

/** Terminals each bar or joint is drawn with: as many as are wired, two at least. */
function barCounts(doc: Installation): Map<string, number> {
  const counts = new Map<string, number>();
  for (const wire of doc.wires)
    for (const [id, mark] of [wire.from, wire.to]) counts.set(id, Math.max(counts.get(id) ?? 2, Number(mark) || 0));
  return counts;
}

/** Where every part stands on its page. */
export function connectionPositions(doc: Installation): Map<string, Position> {
  const counts = barCounts(doc);
  const positions = new Map<string, Position>();
  for (const { place } of connectionPages(doc)) {
    const here = doc.parts.filter((part) => pageOf(doc, part) === place).sort((a, b) => byCode(a.id, b.id));
    for (const [id, at] of rows(here, counts)) positions.set(id, doc.sheet?.connections?.[id] ?? at);
  }
  return positions;
}

/** One place with each core to each terminal. */
export function connectionsScene(doc: Installation, place?: string): Scene {
  const page = place ?? connectionPages(doc)[0]?.place ?? '';
  const here = doc.parts.filter((part) => pageOf(doc, part) === page).sort((a, b) => byCode(a.id, b.id));
  const counts = barCounts(doc);
  const auto = rows(here, counts);
  const feeds = traceFeeds(doc);
  const parts = here.map((part): ScenePart => {
    const at = doc.sheet?.connections?.[part.id] ?? auto.get(part.id)!;
    const count = counts.get(part.id) ?? 2;
    const symbol = symbolFor(part, 'connections', count);
    const marks = isBar(part.kind) ? Array.from({ length: count }, (_, i) => String(i + 1)) : Object.keys(symbol.terminals);
    const size = isBar(part.kind) ? { width: barLength(part.kind as BarKind, count), height: symbol.height } : turnedSize(symbol, at.turn ?? 0);
    const terminals = marks.flatMap((mark): SceneTerminal[] => {
      const t = isBar(part.kind)
        ? { ...barTerminal(part.kind as BarKind, Number(mark) - 1) }
        : terminalAt(part, mark, { x: 0, y: 0, ...(at.turn && { turn: at.turn }) }, 'connections');
      return t ? [{ mark, x: at.x + t.x, y: at.y + t.y, side: t.side }] : [];
    });
    return {
      id: part.id, kind: part.kind, symbol: symbol.id, turn: at.turn ?? 0, x: at.x, y: at.y, ...size, feed: feeds.parts.get(part.id) ?? 'none', terminals,
      texts: [{ text: designation(part), x: at.x, y: at.y - 150, size: BODY, bold: true }],
    };
  });
  const at = new Map<string, SceneTerminal>(parts.flatMap((part) => part.terminals.map((t) => [`${part.id} ${t.mark}`, t] as const)));
  const runs = doc.wires.flatMap((wire): SceneRun[] => {
    const a = at.get(wire.from.join(' '));
    const b = at.get(wire.to.join(' '));
    if (!a && !b) return [];
    const p = a ?? { x: b!.x, y: 500 };
    const q = b ?? { x: a!.x, y: 500 };
    return [{
      id: `wire:${wire.id}`, wires: [wire.id], ...(wire.cable && { cable: wire.cable }), from: wire.from, to: wire.to, role: wire.role,
      points: [{ x: p.x, y: p.y }, { x: q.x, y: p.y }, { x: q.x, y: q.y }],
      feed: feeds.wires.get(wire.id) ?? 'none', ...(wire.colour && { colour: wire.colour }), weight: 'normal', texts: [], hops: [],
    }];
  });
  const width = Math.max(20000, ...parts.map((part) => part.x + part.width)) + 2000;
  const height = Math.max(10000, ...parts.map((part) => part.y + part.height)) + 2000;
  return { face: 'connections', place: page, width, height, bands: [], frames: [], parts: parts.sort(byIdOf), runs: runs.sort(byIdOf), rings: [], dots: [], texts: [] };
}
