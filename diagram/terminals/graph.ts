import { hasTerminal, isBar, terminalsOf } from '../document/kinds';
import {
  canonical,
  type Cable,
  type End,
  type Installation,
  type Part,
  type Place,
  type Wire,
} from '../document/schema';
import { linksOf, type LinkKind } from './links';

/** A joint between two nodes: a wire, or a contact inside a part. */
export interface Edge {
  a: number;
  b: number;
  kind: 'wire' | LinkKind;
  /** set on wires */
  wire?: Wire;
  /** id of the part, on contacts; the plug's on pins */
  part?: string;
  position?: string;
}

/**
 * The document as a graph of terminals. A node is a terminal; all terminals of a bar or joint are one node. Edges are
 * wires and contacts; which contacts are closed is for the reader to say.
 */
export interface Graph {
  document: Installation;
  parts: ReadonlyMap<string, Part>;
  places: ReadonlyMap<string, Place>;
  cables: ReadonlyMap<string, Cable>;
  /** wires whose two ends exist; `edgeOfWire` gives their edge */
  wires: ReadonlyMap<string, Wire>;
  /** wires with an end at a part or terminal that does not exist: they join nothing */
  loose: readonly Wire[];
  size: number;
  partOf: readonly Part[];
  /** the terminal's mark; "" on bars and joints */
  markOf: readonly string[];
  edges: readonly Edge[];
  edgeOfWire: ReadonlyMap<string, number>;
  /** contacts of a part, as edge numbers */
  contactsOf: ReadonlyMap<string, readonly number[]>;
  /** edges at a node: `around[start[n]]` up to `around[start[n + 1]]` */
  start: Int32Array;
  around: Int32Array;
  node(part: string, mark: string): number | undefined;
}

const key = (part: string, mark: string): string => `${part} ${mark}`;

/** Builds the graph; the order of nodes and edges follows ids, so that the same home gives the same graph. */
export function buildGraph(input: Installation): Graph {
  const document = canonical(input);
  const parts = new Map(document.parts.map((part) => [part.id, part]));
  const partOf: Part[] = [];
  const markOf: string[] = [];
  const nodes = new Map<string, number>();
  const addNode = (part: Part, mark: string) => {
    nodes.set(key(part.id, mark), partOf.length);
    partOf.push(part);
    markOf.push(mark);
  };
  for (const part of document.parts) {
    if (isBar(part.kind)) addNode(part, '');
    else for (const mark of terminalsOf(part)) addNode(part, mark);
  }
  const node = (partId: string, mark: string): number | undefined => {
    const part = parts.get(partId);
    if (!part || !hasTerminal(part, mark)) return undefined;
    return nodes.get(key(partId, isBar(part.kind) ? '' : mark));
  };
  const at = (end: End) => node(end[0], end[1]);

  const edges: Edge[] = [];
  const wires = new Map<string, Wire>();
  const loose: Wire[] = [];
  const edgeOfWire = new Map<string, number>();
  for (const wire of document.wires) {
    const a = at(wire.from);
    const b = at(wire.to);
    if (a === undefined || b === undefined) {
      loose.push(wire);
      continue;
    }
    wires.set(wire.id, wire);
    edgeOfWire.set(wire.id, edges.length);
    edges.push({ a, b, kind: 'wire', wire });
  }
  const contactsOf = new Map<string, number[]>();
  const addContact = (edge: Edge & { part: string }) => {
    contactsOf.set(edge.part, [...(contactsOf.get(edge.part) ?? []), edges.length]);
    edges.push(edge);
  };
  for (const part of document.parts) {
    for (const link of linksOf(part)) {
      const a = node(part.id, link.from)!;
      const b = node(part.id, link.to)!;
      addContact({ a, b, kind: link.kind, part: part.id, ...(link.position && { position: link.position }) });
    }
    if (part.kind !== 'plug' || part.in === undefined || parts.get(part.in)?.kind !== 'socket') continue;
    for (const mark of ['L', 'N', 'E'])
      addContact({ a: node(part.id, mark)!, b: node(part.in, mark)!, kind: 'plug', part: part.id });
  }

  const start = new Int32Array(partOf.length + 1);
  for (const { a, b } of edges) {
    start[a + 1]!++;
    if (b !== a) start[b + 1]!++;
  }
  for (let n = 0; n < partOf.length; n++) start[n + 1]! += start[n]!;
  const fill = start.slice();
  const around = new Int32Array(start[partOf.length]!);
  edges.forEach(({ a, b }, i) => {
    around[fill[a]!++] = i;
    if (b !== a) around[fill[b]!++] = i;
  });

  return {
    document,
    parts,
    places: new Map(document.places.map((place) => [place.id, place])),
    cables: new Map(document.cables.map((cable) => [cable.id, cable])),
    wires,
    loose,
    size: partOf.length,
    partOf,
    markOf,
    edges,
    edgeOfWire,
    contactsOf,
    start,
    around,
    node,
  };
}
