'use client';

import { useState } from 'react';
import type { Place } from '@/diagram/document/plan-scale';

/** What is measured on the plan: a length that is known, or the way of a run. */
export type ToolKind = 'scale' | 'run';

export interface Tool {
  kind: ToolKind | null;
  /** put down so far; two make a length, a run has as many as it needs */
  line: readonly Place[];
  /** where the next would be put, by pointer or by keys */
  at: Place;
  begin(kind: ToolKind, at: Place): void;
  hover(at: Place): void;
  put(at: Place): void;
  /** takes the last place back; with none left, leaves */
  back(): void;
  leave(): void;
}

/** The measuring tool of one plan: nothing of it is in the document until a length is kept. */
export function useTool(plan: string | null): Tool {
  const [state, setState] = useState<{ of: string | null; kind: ToolKind | null; line: readonly Place[] }>({
    of: null,
    kind: null,
    line: [],
  });
  const [at, hover] = useState<Place>({ x: 0, y: 0 });
  // Another storey has another scale: what was begun on this one stays with it.
  const { kind, line } = state.of === plan ? state : { kind: null, line: [] };
  const leave = () => setState({ of: plan, kind: null, line: [] });
  return {
    kind,
    line,
    at,
    hover,
    leave,
    begin(next, from) {
      setState({ of: plan, kind: next, line: [] });
      hover(from);
    },
    put(place) {
      if (!kind || (kind === 'scale' && line.length === 2)) return;
      setState({ of: plan, kind, line: [...line, { x: Math.round(place.x), y: Math.round(place.y) }] });
    },
    back() {
      if (line.length === 0) leave();
      else setState({ of: plan, kind, line: line.slice(0, -1) });
    },
  };
}
