'use client';

import { useCallback, useLayoutEffect, useMemo, useRef, type MouseEvent as ReactMouseEvent } from 'react';
import {
  ReactFlow,
  SelectionMode,
  useReactFlow,
  useStore as useFlowStore,
  type NodeChange,
} from 'reactflow';
import 'reactflow/dist/style.css';
import type { End } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import type { Hands } from '../hands';
import type { MarkedNote } from '../margin/notes';
import { useSheet } from '../use-drawing';
import { useView, useViewStore } from '../view';
import { dropDrag, settleDrag, useDrag } from './drag';
import { nodeOf, type PartNode } from './flow-items';
import { GhostLayer } from './ghost-layer';
import { GroundLayer } from './ground-layer';
import { HandLayer, HeldLayer } from './hand-layer';
import { MarksLayer } from './marks-layer';
import { NotesLayer } from './notes-layer';
import { PartNodeView } from './part-node';
import { endsNear, meant, REACH, type Near } from './pick';
import { RunGrips } from './run-grips';
import { RunHits } from './run-hits';
import { RunsLayer } from './runs-layer';
import { PX, px } from './units';
import { useCamera } from './use-camera';
import { useLetters } from './use-letters';
import { useCoarse } from './use-coarse';
import { useHold } from './use-hold';
import { inSight, useSight } from './use-sight';

const nodeTypes = { part: PartNodeView };
const PAN_MOUSE = [1, 2];
const MANY = ['Control', 'Meta', 'Shift'];
/** The authors' name stands in the legend and in the README, where it can be read. */
const ORIGIN = { hideAttribution: true };
/** zoom below which no pointer hits a single run */
const RUNS_FROM = 0.25;
/** parts above which those out of sight are left undrawn */
const LARGE = 300;
const NO_PARTS: ReadonlySet<string> = new Set();

interface CanvasProps {
  scene: Scene;
  ghost: Scene | null;
  notes: readonly MarkedNote[];
  hands: Hands;
  candidates: readonly End[];
  target: End | null;
}

/** The drawing as a canvas: a thin skin over a scene. It draws what it is given and says what was touched. */
export function Canvas({ scene, ghost, notes, hands, candidates, target }: CanvasProps) {
  const { store } = hands;
  const view = useViewStore();
  const flow = useReactFlow<PartNode>();
  const box = useRef<HTMLDivElement>(null);
  const selection = useSheet(store, (state) => state.selection);
  const rights = useSheet(store, (state) => state.rights);
  const editing = useView((state) => state.editing);
  const mayEdit = rights.edit && editing;
  const finding = useView((state) => state.finding);
  const drag = useDrag();
  const coarse = useCoarse();
  const letters = useLetters();
  const runs = useFlowStore((state) => state.transform[2] >= RUNS_FROM);
  const held = useMemo(() => new Set(selection.parts), [selection.parts]);
  const wires = useMemo(() => new Set(selection.wires), [selection.wires]);
  const sight = useSight();
  // On an empty sheet the ghost of a whole draft is what there is to look at.
  useCamera(scene.parts.length > 0 || !ghost ? scene : ghost);
  useHold(box, hands);

  useLayoutEffect(settleDrag, [scene]);

  // The library's own culling asks for every part at every move and draws them one by one as they come into sight.
  const far = scene.parts.length > LARGE && letters ? sight : null;
  const drawn = useMemo(
    () => (far ? scene.parts.filter(({ id, x, width }) => inSight(far, x, width) || held.has(id)) : scene.parts),
    [scene.parts, far, held],
  );
  const nodes = useMemo(
    () =>
      drawn.map((part) => {
        const node = nodeOf(part);
        const selected = held.has(part.id);
        if (drag.ids.has(part.id))
          return { ...node, position: { x: px(part.x + drag.dx), y: px(part.y + drag.dy) }, selected };
        return selected ? { ...node, selected } : node;
      }),
    [drawn, drag, held],
  );

  const onNodesChange = useCallback(
    (changes: NodeChange<PartNode>[]) => {
      const now = store.getState().selection;
      const parts = new Set(now.parts);
      let selected = false;
      for (const change of changes) {
        if (change.type !== 'select') continue;
        selected = true;
        if (change.selected) parts.add(change.id);
        else parts.delete(change.id);
      }
      if (!selected) return;
      const terminal = now.terminal && parts.has(now.terminal[0]) ? now.terminal : null;
      store.getState().select({ parts: [...parts], terminal });
    },
    [store],
  );

  /** A box drawn about parts takes their runs as well. */
  const onSelectionEnd = useCallback(() => {
    const parts = new Set(store.getState().selection.parts);
    const runs = scene.runs.filter(({ from, to }) => parts.has(from[0]) || parts.has(to[0]));
    store.getState().select({ wires: runs.flatMap((run) => run.wires) });
  }, [store, scene.runs]);

  const onNodeDrag = useCallback((_: unknown, node: PartNode, group: PartNode[]) => {
    const start = node.data.part;
    useDrag.setState({
      ids: new Set(group.map(({ id }) => id)),
      dx: node.position.x / PX - start.x,
      dy: node.position.y / PX - start.y,
      dropped: false,
    });
  }, []);

  const onNodeDragStop = useCallback(
    (_: unknown, node: PartNode, group: PartNode[]) => {
      const start = node.data.part;
      dropDrag(
        hands.moveBy(
          group.map(({ id }) => id),
          node.position.x / PX - start.x,
          node.position.y / PX - start.y,
        ),
      );
    },
    [hands],
  );

  /** What lies under a pointer: two terminals where a finger cannot tell them apart. */
  const near = useCallback(
    (event: ReactMouseEvent, under?: string): Near[] => {
      const spot = flow.screenToFlowPosition({ x: event.clientX, y: event.clientY });
      const at = { x: spot.x / PX, y: spot.y / PX };
      const scale = flow.getZoom() * PX;
      if (coarse) return meant(scene, at, scale, under);
      return endsNear(scene, at, under === undefined ? REACH / scale : Infinity, under).slice(0, 1);
    },
    [flow, scene, coarse],
  );

  const tap = useCallback(
    ([first, second]: Near[], id: string) => {
      const { mode, setMode } = view.getState();
      if (first && second) {
        const ends = [first, second].flatMap((each): End[] => hands.oneOf(each.ends) ? [hands.oneOf(each.ends)!] : []);
        setMode({ kind: 'choose', ends, at: first.at, back: mode.kind === 'choose' ? mode.back : mode });
      } else {
        const end = first ? hands.oneOf(first.ends) : null;
        hands.tap(end, end?.[0] ?? id, coarse);
      }
    },
    [hands, view, coarse],
  );

  const onNodeClick = useCallback(
    (event: ReactMouseEvent, node: PartNode) => {
      if (event.ctrlKey || event.metaKey || event.shiftKey) return;
      tap(near(event, node.id), node.id);
    },
    [near, tap],
  );

  const onPaneClick = useCallback(
    (event: ReactMouseEvent) => {
      const found = near(event);
      if (found[0]) tap(found, found[0].ends[0]![0]);
      else hands.letGo();
    },
    [hands, near, tap],
  );

  const onNodeDoubleClick = useCallback((_: unknown, node: PartNode) => hands.editPart(node.id), [hands]);
  const onMoveEnd = useCallback(() => {
    const { x, y, zoom } = flow.getViewport();
    if (x !== Math.round(x) || y !== Math.round(y)) void flow.setViewport({ x: Math.round(x), y: Math.round(y), zoom });
  }, [flow]);

  return (
    <div ref={box} className="h-full w-full">
      <ReactFlow<PartNode>
        nodes={nodes}
        nodeTypes={nodeTypes}
        onNodesChange={onNodesChange}
        onNodeDrag={onNodeDrag}
        onNodeDragStop={onNodeDragStop}
        onNodeClick={onNodeClick}
        onNodeDoubleClick={onNodeDoubleClick}
        onSelectionEnd={onSelectionEnd}
        onPaneClick={onPaneClick}
        onMoveEnd={onMoveEnd}
        nodesConnectable={false}
        nodesDraggable={mayEdit && !coarse}
        nodesFocusable={false}
        disableKeyboardA11y
        deleteKeyCode={null}
        selectionKeyCode={null}
        multiSelectionKeyCode={MANY}
        selectionOnDrag={!coarse}
        selectionMode={SelectionMode.Partial}
        panOnDrag={coarse ? true : PAN_MOUSE}
        // A wheel moves the drawing, as it does in every window that is taller than its frame; with Ctrl, or a pinch, it zooms.
        panOnScroll
        zoomOnDoubleClick={false}
        nodeDragThreshold={4}
        elevateNodesOnSelect={false}
        zIndexMode="manual"
        minZoom={0.12}
        maxZoom={4}
        proOptions={ORIGIN}
        className="sheet-flow"
      >
        <GroundLayer scene={scene} names={letters} />
        <HeldLayer scene={scene} parts={drag.ids.size > 0 ? NO_PARTS : held} />
        <RunsLayer scene={scene} hand={wires} />
        {runs && <RunHits scene={scene} hands={hands} />}
        <MarksLayer scene={scene} letters={letters} sight={sight} />
        <NotesLayer scene={scene} notes={notes} inHand={finding} />
        {mayEdit && <RunGrips scene={scene} hands={hands} />}
        {ghost && <GhostLayer scene={scene} ghost={ghost} />}
        <HandLayer
          scene={scene}
          terminal={drag.ids.size > 0 ? null : selection.terminal}
          candidates={candidates}
          target={target}
        />
      </ReactFlow>
    </div>
  );
}
