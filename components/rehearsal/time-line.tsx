'use client';

import { useLayoutEffect, useRef, useState, useSyncExternalStore } from 'react';
import { Button } from '@/components/ui/button';
import type { Walk } from '@/diagram/rehearsal/walk';
import { timeText } from '@/diagram/rehearsal/words';
import { stationIndex, useRehearsal, useRehearsalStore } from './state';
import { decades, endOf, shareOf, stationPlaces } from './time-scale';

/** px, half a station's target: a finger is 44 wide */
const HALF = 22;
/** px at the left for what was before time began */
const BEFORE = 56;
const RIGHT = 26;
const LINE = 24;

/** px that the line has. */
function useWidth(box: React.RefObject<HTMLDivElement | null>): number {
  const [width, setWidth] = useState(0);
  useLayoutEffect(() => {
    const element = box.current;
    if (!element) return;
    const observer = new ResizeObserver(() => setWidth(element.clientWidth));
    observer.observe(element);
    return () => observer.disconnect();
  }, [box]);
  return width;
}

/** True where a finger points: stations then keep 44 px to themselves. */
const COARSE = '(pointer: coarse)';
function subscribe(changed: () => void): () => void {
  const query = matchMedia(COARSE);
  query.addEventListener('change', changed);
  return () => query.removeEventListener('change', changed);
}
const useCoarse = (): boolean =>
  useSyncExternalStore(
    subscribe,
    () => matchMedia(COARSE).matches,
    () => false,
  );

/** The walk as a logarithmic line of time: stations to step to, the limit, decades. Nothing on it moves by itself. */
export function TimeLine({ walk }: { walk: Walk }) {
  const store = useRehearsalStore();
  const now = useRehearsal(stationIndex);
  const box = useRef<HTMLDivElement>(null);
  const whole = useWidth(box);
  const coarse = useCoarse();
  const width = Math.max(0, whole - HALF - BEFORE - RIGHT);
  const end = endOf(walk);
  const places = stationPlaces(walk, end, BEFORE, width, coarse ? 2 * HALF : 26).map((x) => x + HALF);
  const at = (seconds: number) => HALF + BEFORE + shareOf(seconds, end) * width;
  const station = walk.stations[now]!;
  const { step } = store.getState();
  const when =
    station.t === null
      ? 'before the fault'
      : station.kind === 'still' || station.kind === 'holds'
        ? 'when nothing more happens'
        : `at t = ${timeText(station.t)}`;
  return (
    <div className="flex min-w-0 flex-1 flex-col">
      <div className="flex items-center gap-2 lap:hidden">
        <Button
          className="min-w-11 justify-center"
          aria-label="Step back"
          disabled={now === 0}
          onClick={() => step(now - 1)}
        >
          ←
        </Button>
        <p className="min-w-0 flex-1 truncate text-center">
          <b>
            {now + 1} {station.t !== null && `t = ${timeText(station.t)} `}
            {station.heading}
          </b>
        </p>
        <Button
          className="min-w-11 justify-center"
          aria-label="Step on"
          disabled={now === walk.stations.length - 1}
          onClick={() => step(now + 1)}
        >
          →
        </Button>
      </div>
      <p className="max-lap:hidden">
        <b>Time</b> <span className="ml-2 text-grey">you are {when}</span>
      </p>
      <div ref={box} className="relative h-12 min-w-0" role="group" aria-label="Stations in time">
        {whole > 0 && (
          <>
            <svg width={whole} height={48} className="absolute inset-0" aria-hidden="true">
              <path
                d={`M${HALF} ${LINE}H${whole - RIGHT}M${whole - RIGHT} ${LINE - 6}v12`}
                stroke="var(--ink)"
                strokeWidth={1.6}
              />
              {decades(end).map((seconds) => (
                <g key={seconds}>
                  <path d={`M${at(seconds)} ${LINE - 5}v10`} stroke="var(--ink)" strokeWidth={1.6} />
                  <text x={at(seconds)} y={47} textAnchor="middle" fontSize={11} fill="var(--grey)">
                    {timeText(seconds)}
                  </text>
                </g>
              ))}
              <text x={0} y={47} fontSize={11} fill="var(--ink)">
                before
              </text>
              <path
                d={`M${at(walk.limit.seconds)} 8v${LINE}`}
                stroke="var(--ink)"
                strokeWidth={1.6}
                strokeDasharray="3 3"
              />
              <text x={Math.min(at(walk.limit.seconds), whole - 66) + 4} y={11} fontSize={11} fill="var(--ink)">
                limit {timeText(walk.limit.seconds)}
              </text>
            </svg>
            {walk.stations.map((each, i) => (
              <button
                key={i}
                type="button"
                aria-current={i === now ? 'step' : undefined}
                aria-label={`${i + 1}: ${each.t === null ? '' : `t = ${timeText(each.t)}, `}${each.heading}`}
                className="absolute flex size-6 -translate-x-1/2 -translate-y-1/2 cursor-pointer items-center justify-center pointer-coarse:size-11"
                style={{ left: places[i], top: LINE }}
                onClick={() => step(i)}
              >
                <span
                  className={`flex size-[19px] items-center justify-center rounded-full border-[1.6px] border-ink text-small leading-none font-bold ${i === now ? 'bg-ink text-paper' : 'bg-paper text-ink'}`}
                >
                  {i + 1}
                </span>
              </button>
            ))}
          </>
        )}
      </div>
    </div>
  );
}
