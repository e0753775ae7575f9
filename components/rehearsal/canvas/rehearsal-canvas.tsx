'use client';

import { memo, useCallback, useEffect, useMemo, useRef, type MouseEvent as ReactMouseEvent } from 'react';
import { ReactFlow, useReactFlow, useStore as useFlowStore } from 'reactflow';
import 'reactflow/dist/style.css';
import { EDGE, firstView } from '@/components/sheet/canvas/first-view';
import { GroundLayer } from '@/components/sheet/canvas/ground-layer';
import { HeldLayer } from '@/components/sheet/canvas/hand-layer';
import { middle } from '@/components/sheet/canvas/pick';
import { px } from '@/components/sheet/canvas/units';
import { useLetters } from '@/components/sheet/canvas/use-letters';
import type { Fault } from '@/diagram/circuit/fault-types';
import type { Part } from '@/diagram/document/schema';
import type { Scene } from '@/diagram/layout/scene';
import type { Rehearsed } from '@/diagram/rehearsal/rehearse';
import { settingsOf } from '@/diagram/rehearsal/settings';
import type { Station } from '@/diagram/rehearsal/walk';
import type { PartLook } from '../looks';
import { ConductorsLayer } from './conductors-layer';
import { RehearsalMarks } from './marks';
import { lookNode, LookNodeView, type LookNode } from './part-view';
import { PencilLayer } from './pencil-layer';
import { useLooks } from './use-looks';

const nodeTypes = { look: LookNodeView };
const NO_ORIGIN = { hideAttribution: true };
const NO_EDGES: never[] = [];
const LARGE = 400;
/** px from the edge: nearer to it a part counts as out of sight */
const IN_SIGHT = 20;
/** px: below this the conditions lie on the sheet */
const NARROW = 760;
/** px that they take there */
const CONDITIONS = 60;

interface CanvasProps {
  scene: Scene;
  parts: ReadonlyMap<string, Part>;
  /** id of each wire's cable, of those that have one */
  cableOf: ReadonlyMap<string, string>;
  answer: Rehearsed | null;
  station: Station | null;
  /** the fault in hand, and what its part is called */
  fault: Fault | null;
  faultName: string;
  hand: string | null;
  /** id of the part that must be in sight */
  show: string | null;
  onPart(id: string): void;
  onGround(): void;
}

const same = (a: PartLook, b: PartLook): boolean =>
  a.state === b.state &&
  a.cased === b.cased &&
  a.works === b.works &&
  a.setting === b.setting &&
  a.tripped === b.tripped;

/** Nodes by part and look: what did not change is the same node again, and is not drawn again. */
const known = new WeakMap<Scene['parts'][number], LookNode>();
function nodeFor(part: Scene['parts'][number], look: PartLook, operable: boolean): LookNode {
  const before = known.get(part);
  if (before && before.data.operable === operable && same(before.data.look, look)) return before;
  const node = lookNode(part, look, operable);
  known.set(part, node);
  return node;
}

/** The face as it stands in the rehearsal: a skin over a scene, which says what was touched. */
export const RehearsalCanvas = memo(function RehearsalCanvas(props: CanvasProps) {
  const { scene, parts, cableOf, answer, station, fault, faultName, hand, show, onPart, onGround } = props;
  const flow = useReactFlow();
  const letters = useLetters();
  const box = useFlowStore((state) => `${state.width} ${state.height}`);
  const { figures, runLooks, partLooks } = useLooks(scene, parts, answer, station);
  const nodes = useMemo(
    () =>
      scene.parts.flatMap((drawn) => {
        const look = partLooks.get(drawn.id);
        const part = parts.get(drawn.id);
        return look && part ? [nodeFor(drawn, look, settingsOf(part).length > 0)] : [];
      }),
    [scene, parts, partLooks],
  );
  const held = useMemo(() => new Set(hand === null ? [] : [hand]), [hand]);

  const all = useCallback(() => {
    const [w = 0, h = 0] = box.split(' ').map(Number);
    if (w === 0 || h === 0) return;
    // On a narrow screen the conditions stand along the upper edge.
    void flow.setViewport(firstView(scene, [w, h], w < NARROW ? CONDITIONS : EDGE));
  }, [box, flow, scene]);

  const shown = useRef<string | null>(null);
  const page = `${scene.face} ${scene.place ?? ''}`;
  useEffect(() => {
    if (shown.current === page || box.startsWith('0 ')) return;
    shown.current = page;
    all();
  }, [page, box, all]);

  const target = scene.parts.find(({ id }) => id === show);
  useEffect(() => {
    if (!target) return;
    const { x, y, zoom } = flow.getViewport();
    const [w = 0, h = 0] = box.split(' ').map(Number);
    const at = middle(target);
    const seen = { x: px(at.x) * zoom + x, y: px(at.y) * zoom + y };
    if (seen.x > IN_SIGHT && seen.y > IN_SIGHT && seen.x < w - IN_SIGHT && seen.y < h - IN_SIGHT) return;
    void flow.setCenter(px(at.x), px(at.y), { zoom: Math.max(zoom, 0.8) });
  }, [flow, target, box]);

  const onNodeClick = useCallback((_: ReactMouseEvent, node: LookNode) => onPart(node.id), [onPart]);
  return (
    <ReactFlow<LookNode>
      nodes={nodes}
      edges={NO_EDGES}
      nodeTypes={nodeTypes}
      onNodeClick={onNodeClick}
      onPaneClick={onGround}
      nodesConnectable={false}
      nodesDraggable={false}
      nodesFocusable={false}
      edgesFocusable={false}
      elementsSelectable={false}
      disableKeyboardA11y
      deleteKeyCode={null}
      selectionKeyCode={null}
      multiSelectionKeyCode={null}
      panOnDrag
      zoomOnDoubleClick={false}
      zIndexMode="manual"
      onlyRenderVisibleElements={scene.parts.length > LARGE && letters}
      minZoom={0.12}
      maxZoom={4}
      proOptions={NO_ORIGIN}
      className="sheet-flow"
    >
      <GroundLayer scene={scene} names={letters} />
      <HeldLayer scene={scene} parts={held} />
      <ConductorsLayer scene={scene} looks={runLooks} />
      <RehearsalMarks
        scene={scene}
        letters={letters}
        figures={figures}
        parts={parts}
        partLooks={partLooks}
        runLooks={runLooks}
      />
      {station && fault && (
        <PencilLayer
          scene={scene}
          station={station}
          at={fault.at}
          kind={fault.kind}
          name={faultName}
          cableOf={cableOf}
        />
      )}
    </ReactFlow>
  );
});
