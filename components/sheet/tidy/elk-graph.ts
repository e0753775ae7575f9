import type { ElkNode } from 'elkjs/lib/elk-api';
import { moveEach } from '@/diagram/commands/move-parts';
import type { Command } from '@/diagram/commands/types';
import type { Installation } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import { MODULE } from '@/diagram/symbols/types';

/**
 * The one set of options that elkjs is given. It takes wrong names in silence, so a test holds each of these against the
 * list that it knows. The interactive ones that do nothing in this build are left out on purpose.
 */
export const ELK_OPTIONS = {
  'elk.algorithm': 'layered',
  'elk.direction': 'DOWN',
  'elk.edgeRouting': 'ORTHOGONAL',
  'elk.spacing.nodeNode': '2000',
  'elk.spacing.edgeNode': '750',
  'elk.layered.spacing.nodeNodeBetweenLayers': '3000',
  'elk.layered.nodePlacement.strategy': 'BRANDES_KOEPF',
  'elk.separateConnectedComponents': 'true',
} as const;

export const PORT_OPTIONS = { 'elk.portConstraints': 'FIXED_POS' } as const;

/** Parts and runs as elkjs wants them, sorted by id; sizes and terminals are the symbols' own. */
export function elkGraph(scene: Scene, ids: ReadonlySet<string>): ElkNode {
  const parts = scene.parts.filter((part) => ids.has(part.id)).sort((a, b) => (a.id < b.id ? -1 : 1));
  const port = (id: string, mark: string) => `${id} ${mark}`;
  const known = new Set(parts.flatMap((part) => part.terminals.map((terminal) => port(part.id, terminal.mark))));
  return {
    id: 'sheet',
    layoutOptions: ELK_OPTIONS,
    children: parts.map((part) => ({
      id: part.id,
      width: part.width,
      height: part.height,
      layoutOptions: PORT_OPTIONS,
      ports: part.terminals.map((terminal) => ({
        id: port(part.id, terminal.mark),
        x: terminal.x - part.x,
        y: terminal.y - part.y,
        width: 1,
        height: 1,
      })),
    })),
    edges: scene.runs
      .filter((run) => known.has(port(...run.from)) && known.has(port(...run.to)))
      .sort((a, b) => (a.id < b.id ? -1 : 1))
      .map((run) => ({ id: run.id, sources: [port(...run.from)], targets: [port(...run.to)] })),
  };
}

/** What elkjs found, as one command: the group keeps its upper left corner, every part stands on the module. */
export function elkCommand(doc: Installation, scene: Scene, laidOut: ElkNode): Command {
  const parts = new Map(scene.parts.map((part) => [part.id, part]));
  const moved = (laidOut.children ?? []).flatMap((node) => {
    const part = parts.get(node.id);
    return part && node.x !== undefined && node.y !== undefined ? [{ part, x: node.x, y: node.y }] : [];
  });
  const left = Math.min(...moved.map(({ part }) => part.x));
  const top = Math.min(...moved.map(({ part }) => part.y));
  const [x0, y0] = [Math.min(...moved.map(({ x }) => x)), Math.min(...moved.map(({ y }) => y))];
  const snap = (value: number) => Math.round(value / MODULE) * MODULE;
  const ways = moved
    .map(({ part, x, y }) => ({ id: part.id, dx: snap(left + x - x0) - part.x, dy: snap(top + y - y0) - part.y }))
    .filter(({ dx, dy }) => dx !== 0 || dy !== 0);
  const { label, patch } = moveEach(doc, scene.face, new Map(ways.map((way) => [way.id, way])), 'Tidy for short wires');
  return { label, patch };
}
