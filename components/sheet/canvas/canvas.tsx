'use client';

import { useCallback, useEffect, useMemo, useRef, useState, type MouseEvent as ReactMouseEvent } from 'react';
import {
  ConnectionMode,
  ReactFlow,
  SelectionMode,
  useReactFlow,
  useStore as useFlowStore,
  type EdgeChange,
  type NodeChange,
} from 'reactflow';
import 'reactflow/dist/style.css';
import type { End } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import type { MarkedNote } from '../margin/notes';
import { useSheet } from '../use-drawing';
import { useView, useViewStore } from '../view';
import type { Hands } from '../hands';
import { useDrag, endDrag } from './drag';
import { edgeOf, nodeOf, type PartNode, type RunEdge } from './flow-items';
import { GhostLayer } from './ghost-layer';
import { GroundLayer } from './ground-layer';
import { HandLayer, HeldLayer } from './hand-layer';
import { MarksLayer } from './marks-layer';
import { NotesLayer } from './notes-layer';
import { PartNodeView } from './part-node';
import { nearestEnd } from './pick';
import { RunEdgeView } from './run-edge';
import { RunsLayer } from './runs-layer';
import { PX, px } from './units';

const nodeTypes = { part: PartNodeView };
const edgeTypes = { run: RunEdgeView };
const PAN_MOUSE = [1, 2];
const MANY = ['Control', 'Meta', 'Shift'];
const NO_ORIGIN = { hideAttribution: true };
const LETTERS_FROM = 0.42;
/** below it the body size of the lettering would be under 11 px */
const READABLE = 0.9;
const LARGE = 400;
/** px on the screen within which a terminal is taken: half of 44 */
const REACH = 22;

interface CanvasProps {
  scene: Scene;
  ghost: Scene | null;
  notes: readonly MarkedNote[];
  hands: Hands;
  candidates: readonly End[];
  target: End | null;
}

/** True where the pointer is a finger: then one finger pans, and parts are moved by their own command. */
function useCoarse(): boolean {
  const [coarse, setCoarse] = useState(false);
  useEffect(() => {
    const query = matchMedia('(pointer: coarse)');
    const look = () => setCoarse(query.matches);
    look();
    query.addEventListener('change', look);
    return () => query.removeEventListener('change', look);
  }, []);
  return coarse;
}

/** The drawing as a canvas: a thin skin over a scene. It draws what it is given and says what was touched. */
export function Canvas({ scene, ghost, notes, hands, candidates, target }: CanvasProps) {
  const { store } = hands;
  const view = useViewStore();
  const flow = useReactFlow<PartNode, RunEdge>();
  const selection = useSheet(store, (state) => state.selection);
  const rights = useSheet(store, (state) => state.rights);
  const editing = useView((state) => state.editing);
  const mayEdit = rights.edit && editing;
  const finding = useView((state) => state.finding);
  const dragIds = useDrag((drag) => drag.ids);
  const [moved, setMoved] = useState<ReadonlyMap<string, { x: number; y: number }>>(new Map());
  const coarse = useCoarse();
  const letters = useFlowStore((state) => state.transform[2] >= LETTERS_FROM);
  const box = useFlowStore((state) => `${state.width} ${state.height}`);
  const held = useMemo(() => new Set(selection.parts), [selection.parts]);
  const wires = useMemo(() => new Set(selection.wires), [selection.wires]);

  const nodes = useMemo(
    () =>
      scene.parts.map((part) => {
        const node = nodeOf(part);
        const position = moved.get(part.id);
        const selected = held.has(part.id);
        return position || selected ? { ...node, ...(position && { position }), selected } : node;
      }),
    [scene.parts, moved, held],
  );
  const edges = useMemo(() => scene.runs.map(edgeOf), [scene.runs]);

  const width = px(scene.width);
  const height = px(scene.height);
  const all = useCallback(() => {
    const [w = 0, h = 0] = box.split(' ').map(Number);
    if (w === 0 || h === 0) return;
    // The whole sheet, but never so small that its lettering cannot be read: then the source and what lies about it.
    const fit = Math.min((w - 16) / width, (h - 16) / height);
    const zoom = Math.min(1.6, Math.max(READABLE, fit));
    const source = scene.face === 'overview' ? scene.parts.find((part) => part.kind === 'supply') : undefined;
    const centre = source ? px(source.x + source.width / 2) * zoom : 0;
    const spare = w - width * zoom;
    const x = spare >= 0 ? spare / 2 : Math.min(8, Math.max(spare - 8, w / 2 - centre));
    // The names of the pages stand along the upper edge of the connections face.
    const top = scene.face === 'connections' ? 40 : 8;
    const y = Math.max(top, (h - height * zoom) / 2);
    void flow.setViewport({ x: Math.round(x), y: Math.round(y), zoom });
  }, [box, flow, width, height, scene]);

  const shown = useRef<string | null>(null);
  const page = `${scene.face} ${scene.place ?? ''}`;
  useEffect(() => {
    if (shown.current === page || box.startsWith('0 ')) return;
    shown.current = page;
    all();
  }, [page, box, all]);

  useEffect(() => {
    view.getState().set({
      camera: {
        all,
        zoom: (by) => void flow.zoomTo(flow.getZoom() * by),
        show(point, always = false) {
          const { x, y, zoom } = flow.getViewport();
          const [w = 0, h = 0] = box.split(' ').map(Number);
          const at = { x: px(point.x) * zoom + x, y: px(point.y) * zoom + y };
          if (!always && at.x > 60 && at.y > 60 && at.x < w - 60 && at.y < h - 60) return;
          void flow.setCenter(px(point.x), px(point.y), { zoom: Math.max(zoom, 0.8) });
        },
        onScreen(point) {
          const { x, y, zoom } = flow.getViewport();
          return { x: px(point.x) * zoom + x, y: px(point.y) * zoom + y };
        },
      },
    });
  }, [view, flow, all, box]);

  const sceneAt = useCallback(
    (event: { clientX: number; clientY: number }) => {
      const at = flow.screenToFlowPosition({ x: event.clientX, y: event.clientY });
      return { x: at.x / PX, y: at.y / PX };
    },
    [flow],
  );

  const onNodesChange = useCallback(
    (changes: NodeChange<PartNode>[]) => {
      const now = store.getState().selection;
      const parts = new Set(now.parts);
      let selected = false;
      for (const change of changes) {
        if (change.type === 'select') {
          selected = true;
          if (change.selected) parts.add(change.id);
          else parts.delete(change.id);
        } else if (change.type === 'position' && change.position && change.dragging) {
          const { id, position } = change;
          setMoved((before) => new Map(before).set(id, position));
        }
      }
      if (selected) {
        const ids = [...parts];
        const terminal = now.terminal && parts.has(now.terminal[0]) ? now.terminal : null;
        store.getState().select({ parts: ids, terminal });
      }
    },
    [store],
  );

  const onEdgesChange = useCallback(
    (changes: EdgeChange<RunEdge>[]) => {
      const chosen = new Set(store.getState().selection.wires);
      let selected = false;
      for (const change of changes) {
        if (change.type !== 'select') continue;
        selected = true;
        const run = scene.runs.find((candidate) => candidate.id === change.id);
        for (const wire of run?.wires ?? []) {
          if (change.selected) chosen.add(wire);
          else chosen.delete(wire);
        }
      }
      if (selected) store.getState().select({ wires: [...chosen] });
    },
    [store, scene.runs],
  );

  const onNodeDrag = useCallback((_: unknown, node: PartNode, group: PartNode[]) => {
    const start = node.data.part;
    useDrag.setState({
      ids: new Set(group.map(({ id }) => id)),
      dx: node.position.x / PX - start.x,
      dy: node.position.y / PX - start.y,
    });
  }, []);

  const onNodeDragStop = useCallback(
    (_: unknown, node: PartNode, group: PartNode[]) => {
      const start = node.data.part;
      hands.moveBy(
        group.map(({ id }) => id),
        node.position.x / PX - start.x,
        node.position.y / PX - start.y,
      );
      setMoved(new Map());
      endDrag();
    },
    [hands],
  );

  const onNodeClick = useCallback(
    (event: ReactMouseEvent, node: PartNode) => {
      if (event.ctrlKey || event.metaKey || event.shiftKey) return;
      const at = sceneAt(event);
      const end = nearestEnd(scene, at, Infinity, node.id);
      hands.tap(end ?? null, node.id, coarse);
    },
    [hands, scene, sceneAt, coarse],
  );

  const onPaneClick = useCallback(
    (event: ReactMouseEvent) => {
      const zoom = flow.getZoom();
      const end = nearestEnd(scene, sceneAt(event), REACH / PX / zoom);
      if (end) hands.tap(end, end[0], coarse);
      else hands.letGo();
    },
    [flow, hands, scene, sceneAt, coarse],
  );

  const onNodeDoubleClick = useCallback((_: unknown, node: PartNode) => hands.editPart(node.id), [hands]);
  const onEdgeDoubleClick = useCallback(
    (_: unknown, edge: RunEdge) => edge.data && hands.editRun(edge.data.run),
    [hands],
  );
  const onMoveEnd = useCallback(() => {
    const { x, y, zoom } = flow.getViewport();
    if (x !== Math.round(x) || y !== Math.round(y)) void flow.setViewport({ x: Math.round(x), y: Math.round(y), zoom });
  }, [flow]);

  return (
    <ReactFlow<PartNode, RunEdge>
      nodes={nodes}
      edges={edges}
      nodeTypes={nodeTypes}
      edgeTypes={edgeTypes}
      onNodesChange={onNodesChange}
      onEdgesChange={onEdgesChange}
      onNodeDrag={onNodeDrag}
      onNodeDragStop={onNodeDragStop}
      onNodeClick={onNodeClick}
      onNodeDoubleClick={onNodeDoubleClick}
      onEdgeDoubleClick={onEdgeDoubleClick}
      onPaneClick={onPaneClick}
      onMoveEnd={onMoveEnd}
      connectionMode={ConnectionMode.Loose}
      nodesConnectable={false}
      nodesDraggable={mayEdit && !coarse}
      nodesFocusable={false}
      edgesFocusable={false}
      disableKeyboardA11y
      deleteKeyCode={null}
      selectionKeyCode={null}
      multiSelectionKeyCode={MANY}
      selectionOnDrag={!coarse}
      selectionMode={SelectionMode.Partial}
      panOnDrag={coarse ? true : PAN_MOUSE}
      zoomOnDoubleClick={false}
      nodeDragThreshold={coarse ? 10 : 4}
      elevateNodesOnSelect={false}
      elevateEdgesOnSelect={false}
      zIndexMode="manual"
      onlyRenderVisibleElements={scene.parts.length > LARGE && letters}
      minZoom={0.12}
      maxZoom={4}
      proOptions={NO_ORIGIN}
      className="sheet-flow"
    >
      <GroundLayer scene={scene} names={letters} />
      <HeldLayer scene={scene} parts={dragIds.size > 0 ? EMPTY : held} />
      <RunsLayer scene={scene} hand={wires} />
      <MarksLayer scene={scene} letters={letters && dragIds.size === 0} />
      <NotesLayer scene={scene} notes={notes} inHand={finding} />
      {ghost && <GhostLayer scene={scene} ghost={ghost} />}
      <HandLayer scene={scene} terminal={selection.terminal} candidates={candidates} target={target} />
    </ReactFlow>
  );
}

const EMPTY: ReadonlySet<string> = new Set();
