'use client';

import { useEffect, useRef, useState, type CSSProperties, type KeyboardEvent, type PointerEvent, type RefObject } from 'react';
import { symbolFor } from '@/diagram/symbols';
import { light } from '@/diagram/symbols/palette';
import { pictureHref } from '@/lib/shared/uploads';
import { useBox } from '@/components/sheet/floating';
import { useSuspended, useSuspending } from '@/components/sheet/guiding';
import { MeasureLine, ScaleMark } from './measure-line';
import { PlanGuides } from './plan-guides';
import { LETTERS, PlanPart } from './plan-part';
import type { Plan, Point } from './use-plan';
import { ZoomButtons } from './zoom-buttons';

/** 1/100 mm of paper round the picture */
const EDGE = 400;
const STEP = 250;
const FAR = 1000;
const ZOOM = 1.4;
const MOST_ZOOM = 8;
/** px, of designations, when the plan opens */
const LEAST_PX = 11;
/** px that a hand moves before it drags */
const THRESHOLD = { mouse: 4, pen: 6, touch: 10 } as const;

/** The picture is paper whatever the screen's colours are, so what lies on it is drawn in ink. */
const PAPER = Object.fromEntries(Object.entries(light).map(([name, value]) => [`--${name}`, value])) as CSSProperties;
const ARROWS: Record<string, Point> = {
  ArrowLeft: { x: -1, y: 0 },
  ArrowRight: { x: 1, y: 0 },
  ArrowUp: { x: 0, y: -1 },
  ArrowDown: { x: 0, y: 1 },
};

interface PlanCanvasProps {
  state: Plan;
  box: RefObject<HTMLDivElement | null>;
  onKey(event: KeyboardEvent): void;
}

/** The plan of a storey with the parts that stand on it: one stop for Tab, worked by keys, mouse and finger. */
export function PlanCanvas({ state, box, onKey }: PlanCanvasProps) {
  const svg = useRef<SVGSVGElement>(null);
  const [zoom, setZoom] = useState(1);
  const drag = useRef<{ from: Point; at: Point; moved: boolean; threshold: number } | null>(null);
  const { plan, placed, placing, ghost, carried, inHand, rights, tool } = state;
  const held = inHand[0];
  const { width: planWidth, height: planHeight } = plan ?? { width: 0, height: 0 };

  /** px for 1/100 mm at which the whole plan is in sight; 0 before anything is laid out */
  const { width: boxWidth, height: boxHeight } = useBox(box);
  const fit = Math.min(boxWidth / (planWidth + 2 * EDGE), boxHeight / (planHeight + 2 * EDGE));
  useEffect(() => {
    // On a small screen the whole plan would be too small to read: it opens larger, and is scrolled.
    const frame = requestAnimationFrame(() => {
      if (fit > 0) setZoom((now) => (now === 1 ? Math.min(3, Math.max(1, LEAST_PX / (LETTERS * fit))) : now));
    });
    return () => cancelAnimationFrame(frame);
  }, [fit]);

  useEffect(() => {
    box.current?.querySelector('[data-held]')?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  }, [box, held]);

  const suspended = useSuspended((now) => now.suspended);
  useSuspending(carried !== null || placing !== null);
  if (!plan) return null;
  const guides = state.guides();
  const carriedPart = state.document.parts.find(({ id }) => id === placing);

  /** A place on the screen as a place on the plan. */
  const onPlan = (event: { clientX: number; clientY: number }): Point => {
    const matrix = svg.current!.getScreenCTM()!.inverse();
    const { x, y } = new DOMPoint(event.clientX, event.clientY).matrixTransform(matrix);
    return { x: Math.round(x), y: Math.round(y) };
  };

  const begin = (event: PointerEvent, id: string) => {
    if (placing || tool.kind || event.button !== 0) return;
    event.stopPropagation();
    const add = event.shiftKey || event.ctrlKey || event.metaKey;
    if (!inHand.includes(id)) state.take(add ? [...inHand, id] : [id]);
    box.current?.focus({ preventScroll: true });
    if (!rights.edit) return;
    svg.current!.setPointerCapture(event.pointerId);
    const threshold = THRESHOLD[event.pointerType as keyof typeof THRESHOLD] ?? THRESHOLD.mouse;
    drag.current = { from: onPlan(event), at: { x: event.clientX, y: event.clientY }, moved: false, threshold };
  };
  const move = (event: PointerEvent) => {
    if (tool.kind) return tool.hover(onPlan(event));
    if (placing) return state.setGhost(onPlan(event));
    const now = drag.current;
    if (!now) return;
    if (!now.moved && Math.hypot(event.clientX - now.at.x, event.clientY - now.at.y) < now.threshold) return;
    now.moved = true;
    const { x, y } = onPlan(event);
    state.drag({ x: x - now.from.x, y: y - now.from.y });
  };
  const end = (event: PointerEvent) => {
    const now = drag.current;
    drag.current = null;
    if (now?.moved) {
      const { x, y } = onPlan(event);
      state.release({ x: x - now.from.x, y: y - now.from.y });
    }
  };
  const cancel = () => {
    drag.current = null;
    state.drag(null);
  };

  const onKeyDown = (event: KeyboardEvent) => {
    const way = ARROWS[event.key];
    if (way) {
      const by = event.shiftKey || !(placing || tool.kind) ? STEP : FAR;
      const from = tool.kind ? tool.at : ghost;
      const to = {
        x: Math.min(plan.width, Math.max(0, from.x + way.x * by)),
        y: Math.min(plan.height, Math.max(0, from.y + way.y * by)),
      };
      if (tool.kind) tool.hover(to);
      else if (placing) state.setGhost(to);
      else state.nudgeBy(way.x * (event.shiftKey ? FAR : STEP), way.y * (event.shiftKey ? FAR : STEP));
      return event.preventDefault();
    }
    if (tool.kind && event.key === 'Enter') tool.put(tool.at);
    else if (tool.kind && (event.key === 'Backspace' || event.key === 'Delete')) tool.back();
    else if (placing && event.key === 'Enter') state.put(ghost);
    else if (event.key === '+' || event.key === '=') setZoom(Math.min(MOST_ZOOM, zoom * ZOOM));
    else if (event.key === '-') setZoom(Math.max(1, zoom / ZOOM));
    else return onKey(event);
    event.preventDefault();
  };

  // As large as the plan is drawn: what lies beside it is no paper, and scrolls with nothing.
  const size =
    fit > 0
      ? { width: Math.floor(zoom * fit * (plan.width + 2 * EDGE)), height: Math.floor(zoom * fit * (plan.height + 2 * EDGE)) }
      : { width: '100%', height: '100%' };
  const viewBox = `${-EDGE} ${-EDGE} ${plan.width + 2 * EDGE} ${plan.height + 2 * EDGE}`;
  return (
    <div className="relative h-full min-h-[50dvh]">
      <div
        ref={box}
        role="application"
        aria-label={`Plan of the ${plan.name}`}
        tabIndex={0}
        className="flex h-full overflow-auto bg-behind focus-visible:-outline-offset-2"
        onKeyDown={onKeyDown}
        onBlur={state.endNudge}
      >
        <svg
          ref={svg}
          viewBox={viewBox}
          preserveAspectRatio="xMidYMid meet"
          style={{ ...PAPER, ...size }}
          className={`m-auto block shrink-0 ${placing || tool.kind ? 'cursor-crosshair touch-none' : ''}`}
          onPointerMove={move}
          onPointerUp={end}
          onPointerCancel={cancel}
          onClick={(event) => {
            if (tool.kind) tool.put(onPlan(event));
            else if (placing) state.put(onPlan(event));
          }}
          onPointerDown={(event) => {
            if (!placing && !tool.kind && event.target === event.currentTarget) state.take([]);
          }}
        >
          <rect x={-EDGE} y={-EDGE} width={plan.width + 2 * EDGE} height={plan.height + 2 * EDGE} className="fill-paper" pointerEvents="none" />
          <image href={pictureHref(plan.picture)} width={plan.width} height={plan.height} pointerEvents="none" />
          <ScaleMark plan={plan} />
          {placed.map(({ part, at }) => {
            const off = carried && inHand.includes(part.id) ? carried : null;
            return (
              <PlanPart
                key={part.id}
                part={part}
                at={off ? { ...at, x: at.x + off.x, y: at.y + off.y } : at}
                held={inHand.includes(part.id)}
                locked={at.locked ?? false}
                label={state.describe(part)}
                onPointerDown={(event) => begin(event, part.id)}
              />
            );
          })}
          {carriedPart && (
            <g pointerEvents="none">
              <PlanPart
                part={carriedPart}
                ghost
                held
                at={{
                  x: ghost.x - symbolFor(carriedPart, 'overview').width / 2,
                  y: ghost.y - symbolFor(carriedPart, 'overview').height / 2,
                }}
              />
            </g>
          )}
          {guides && <PlanGuides guided={guides} suspended={suspended} />}
          <MeasureLine tool={tool} plan={plan} />
        </svg>
      </div>
      <ZoomButtons onSmaller={() => setZoom(Math.max(1, zoom / ZOOM))} onLarger={() => setZoom(Math.min(MOST_ZOOM, zoom * ZOOM))} />
    </div>
  );
}
