import { fireEvent, render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { ReactFlowProvider } from 'reactflow';
import { describe, expect, it, vi } from 'vitest';
import { ACTIONS, type ActionContext } from '@/components/sheet/actions';
import { RunGrips } from '@/components/sheet/canvas/run-grips';
import { Hands } from '@/components/sheet/hands';
import { endMove, nudge } from '@/components/sheet/moving';
import { runInHand } from '@/components/sheet/leading';
import { createDrawingStore } from '@/components/sheet/store';
import { createView, ViewProvider } from '@/components/sheet/view';
import { stretchAcross } from '@/diagram/commands/bend-run';
import { buildScene } from '@/diagram/layout/build-scene';
import { counter } from '../../diagram/commands/counter';
import { draftedHome } from '../../diagram/commands/drafted';
import { FakeServer } from './fake-server';

// the ground of the canvas is not laid out here: a point of the screen is a point of the drawing
vi.mock('reactflow', async (load) => ({
  ...(await load<typeof import('reactflow')>()),
  ViewportPortal: ({ children }: { children: ReactNode }) => children,
  useReactFlow: () => ({ screenToFlowPosition: (at: { x: number; y: number }) => at }),
}));
Element.prototype.setPointerCapture ??= () => undefined;

const home = draftedHome(2);
const scene = buildScene(home, 'connections', { place: 'room0' });
const run = scene.runs.find((candidate) => candidate.role === 'neutral' && stretchAcross(candidate, 'x') !== null)!;
const upright = stretchAcross(run, 'x')!;

function inHand(wires: readonly string[]) {
  const store = createDrawingStore(new FakeServer(home).view(), () => undefined);
  const view = createView('connections', 'room0');
  const hands = new Hands({ store, view, newId: counter('h') });
  hands.show(scene);
  store.getState().select({ parts: [], wires, terminal: null });
  const bends = () => store.getState().document.sheet?.bends ?? {};
  return { store, view, hands, bends };
}
const act = (id: string, hands: Hands) => ACTIONS.find((action) => action.id === id)!.does({ hands } as ActionContext);

describe('leading a run with keys', () => {
  it('moves its longest stretch across the arrows by modules, in one undo, and routes it again by its command', () => {
    const { store, hands, view, bends } = inHand(run.wires);
    expect(runInHand(scene, store.getState().selection)).toBe(run);
    act('move', hands);
    for (let i = 0; i < 3; i++) nudge(hands, 'right');
    expect(view.getState().mode).toEqual({ kind: 'move', dx: 3, dy: 0 });
    endMove(hands);
    expect(bends()).toEqual({ [`connections:${run.wires[0]}`]: [{ x: run.points[upright]!.x + 750 }] });
    store.getState().undo();
    expect(bends()).toEqual({});
    store.getState().redo();
    act('route-again', hands);
    expect(bends()).toEqual({});
    act('route-again', hands);
    expect(store.getState().notice).toMatch(/led by hand/);
  });

  it('says so where nothing is in hand', () => {
    const { store, hands, view } = inHand([]);
    act('move', hands);
    expect(view.getState().mode.kind).toBe('rest');
    expect(store.getState().notice).toMatch(/part or a run/);
  });
});

describe('leading a run with a pointer', () => {
  it('has a grip on every stretch; one that is dragged stays on the module where it is let go', () => {
    const { hands, view, bends } = inHand(run.wires);
    const { container } = render(
      <ReactFlowProvider>
        <ViewProvider value={view}>
          <RunGrips scene={scene} hands={hands} />
        </ViewProvider>
      </ReactFlowProvider>,
    );
    const grips = container.querySelectorAll('[data-stretch]');
    expect(grips).toHaveLength(run.points.length - 1);
    const grip = grips[upright]!;
    const px = 0.036;
    const x = run.points[upright]!.x;
    fireEvent.pointerDown(grip, { pointerId: 1, clientX: x * px, clientY: 0 });
    fireEvent.pointerMove(grip, { pointerId: 1, clientX: (x + 1000) * px, clientY: 40 });
    expect(container.querySelectorAll('path[stroke="var(--ghost)"]')).toHaveLength(1);
    fireEvent.pointerUp(grip, { pointerId: 1, clientX: (x + 1010) * px, clientY: 40 });
    expect(bends()).toEqual({ [`connections:${run.wires[0]}`]: [{ x: x + 1000 }] });
  });

  it('changes nothing where it is let go where it was', () => {
    const { hands, view, bends } = inHand(run.wires);
    const { container } = render(
      <ViewProvider value={view}>
        <RunGrips scene={scene} hands={hands} />
      </ViewProvider>,
    );
    const grip = container.querySelectorAll('[data-stretch]')[upright]!;
    fireEvent.pointerDown(grip, { pointerId: 1, clientX: 0, clientY: 0 });
    fireEvent.pointerUp(grip, { pointerId: 1, clientX: run.points[upright]!.x * 0.036, clientY: 9 });
    expect(bends()).toEqual({});
  });
});
