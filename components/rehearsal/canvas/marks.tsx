import { memo, useMemo } from 'react';
import { Layer } from '@/components/sheet/canvas/layer';
import { Lettering, Letterings } from '@/components/sheet/canvas/lettering';
import { INK } from '@/components/sheet/canvas/units';
import type { Point, Scene, ScenePart, SceneRun, SceneText } from '@/diagram/layout/scene';
import type { Figures, PartFigures } from '@/diagram/rehearsal/figures';
import { settingWord } from '@/diagram/rehearsal/settings';
import { ampText, voltText } from '@/diagram/rehearsal/words';
import { symbolById } from '@/diagram/symbols';
import { turnedPoint } from '@/diagram/symbols/turn';
import { STROKE } from '@/diagram/symbols/types';
import type { Part } from '@/diagram/document/schema';
import { FIGURE_SIZE, figurePlaces, LINE_PITCH, type FigurePlace } from './figure-places';
import { longest } from './pencil-lines';
import { tightAmps, type PartLook, type RunLook } from '../looks';

const SMALL = 220;
const inkOf = (dead: boolean) =>
  ({ stroke: dead ? 'var(--grey)' : 'var(--ink)', strokeWidth: STROKE.normal * INK, strokeLinecap: 'round' }) as const;

/** Tick marks across a run, one a core: plain L, dotted N, barred PE. */
const Ticks = memo(function Ticks({ run, cased, dead }: { run: SceneRun; cased: boolean; dead: boolean }) {
  if (!run.ticks) return null;
  const { at, vertical, cores } = run.ticks;
  const half = cased ? 220 : 180;
  const ink = inkOf(dead);
  return (
    <g transform={`translate(${at.x} ${at.y}) rotate(${vertical ? 0 : 90})`}>
      {cores.map((core, i) => (
        <g key={core} transform={`translate(0 ${200 * i})`}>
          <path d={`M${-half} 120L${half} -120`} {...ink} />
          {core === 'N' && <circle cx={half} cy={-120} r={62} fill={ink.stroke} />}
          {core === 'E' && <path d={`M${half - 65} -205L${half + 65} -35`} {...ink} />}
        </g>
      ))}
    </g>
  );
});

/** True when a point lies on a run. */
const liesOn = ({ x, y }: Point, { points }: SceneRun): boolean =>
  points.some((a, i) => {
    const b = points[i + 1];
    if (!b) return a.x === x && a.y === y;
    return Math.min(a.x, b.x) <= x && x <= Math.max(a.x, b.x) && Math.min(a.y, b.y) <= y && y <= Math.max(a.y, b.y);
  });

interface PartTextsProps {
  part: ScenePart;
  dead: boolean;
  /** what stands beneath a load in the place of its rating */
  figure: string | undefined;
}

/** The lettering of a part as it reads now: grey when dead, beneath a load its amperes or 0 V. */
const PartTexts = memo(function PartTexts({ part, dead, figure }: PartTextsProps) {
  const rating = part.texts.findIndex(({ bold }) => !bold);
  const texts = part.texts.flatMap((text, i): SceneText[] => {
    const grey = dead ? { ...text, tone: 'grey' as const } : text;
    if (figure === undefined || text.bold) return [grey];
    return i === rating ? [{ ...grey, text: figure }] : [];
  });
  return <Letterings texts={texts} />;
});

const RunTexts = memo(function RunTexts({ run, dead }: { run: SceneRun; dead: boolean }) {
  return <Letterings texts={dead ? run.texts.map((text) => ({ ...text, tone: 'grey' })) : run.texts} />;
});

/** What stands beneath a load: its amperes at work, else its volts. */
function loadFigure(load: PartFigures['load'], look: PartLook): string | undefined {
  if (!load) return undefined;
  return look.works ? tightAmps(load.amps) : voltText(load.volts).replace(' V', look.state === 'dead' ? ' V' : 'V');
}

/** Which runs meet at a joint, and which leave a part: worked out once a scene. */
function meetingsOf(scene: Scene) {
  const atDot = scene.dots.map((dot) => scene.runs.filter((run) => liesOn(dot, run)).map(({ id }) => id));
  const atPart = new Map<string, string[]>();
  for (const { id, from, to } of scene.runs)
    for (const [part] of [from, to]) atPart.set(part, [...(atPart.get(part) ?? []), id]);
  return { atDot, atPart };
}

/** Volts and amperes beside what they are of. */
function FigurePair({ place, volts, amps, dead }: { place: FigurePlace; volts: number; amps: number; dead: boolean }) {
  const { x, y, anchor, lines } = place;
  const first = y + FIGURE_SIZE;
  const common = { x, anchor, size: FIGURE_SIZE };
  if (dead)
    return <Lettering text={{ ...common, y: first + (lines === 2 ? LINE_PITCH / 2 : 0), text: '0 V', tone: 'grey' }} />;
  const [u, i] = [voltText(volts), amps < 0.0005 ? '0 A' : lines === 2 ? tightAmps(amps) : ampText(amps)];
  if (lines === 1) return <Lettering text={{ ...common, y: first, text: `${u} ${i}`, bold: true }} />;
  return (
    <>
      <Lettering text={{ ...common, y: first, text: u, bold: true }} />
      <Lettering text={{ ...common, y: first + LINE_PITCH, text: i, bold: true }} />
    </>
  );
}

/** 1/100 mm: on a shorter stretch of a core no figure stands */
const BEARS_FIGURE = 1900;

/** Volts and amperes beside the longest stretch of a core, where that is long enough. */
function CoreFigures({ run, look }: { run: SceneRun; look: RunLook }) {
  const stretch = longest(run.points);
  if (!stretch || look.state === 'plain') return null;
  const { a, b } = stretch;
  if (Math.abs(a.x - b.x) + Math.abs(a.y - b.y) < BEARS_FIGURE) return null;
  const upright = a.x === b.x;
  const text =
    look.state === 'dead'
      ? '0 V'
      : look.state === 'return'
        ? ampText(look.amps)
        : `${voltText(look.volts)} ${ampText(look.amps)}`;
  const [x, y] = [(a.x + b.x) / 2, (a.y + b.y) / 2];
  // Beside the core, on the side that a reader meets first: left of what runs up, above what runs across.
  const at = upright ? { x: x - 170, y, turn: 3 as const } : { x, y: y - 170 };
  return (
    <g style={{ paintOrder: 'stroke' }} stroke="var(--paper)" strokeWidth={110} strokeLinejoin="round">
      <Lettering text={{ ...at, text, size: 225, anchor: 'middle', tone: look.state === 'dead' ? 'grey' : 'ink' }} />
    </g>
  );
}

/** V of what leaves a source: of the wires at it that it feeds. */
function sourceVolts(id: string, figures: Figures, scene: Scene): number {
  const wires = scene.runs.filter(({ from, to }) => from[0] === id || to[0] === id).flatMap((run) => run.wires);
  return wires.reduce((most, wire) => {
    const now = figures.wires[wire];
    return now && now.from[0] === id ? Math.max(most, now.volts) : most;
  }, 0);
}

interface MarksProps {
  scene: Scene;
  letters: boolean;
  figures: Figures;
  parts: ReadonlyMap<string, Part>;
  partLooks: ReadonlyMap<string, PartLook>;
  runLooks: ReadonlyMap<string, RunLook>;
}

/** Ticks, joints, numbers, lettering, and the figures beside what they are of. */
export const RehearsalMarks = memo(function RehearsalMarks(props: MarksProps) {
  const { scene, letters, figures, parts, partLooks, runLooks } = props;
  const isDead = (run: SceneRun) => runLooks.get(run.id)?.state === 'dead';
  const cores = scene.face === 'connections';
  const places = useMemo(() => figurePlaces(scene), [scene]);
  const meetings = useMemo(() => meetingsOf(scene), [scene]);
  const ofWay = (device: string) => (meetings.atPart.get(device) ?? []).map((id) => runLooks.get(id)!);
  return (
    <Layer scene={scene} level={2} name="figures">
      {scene.runs.map((run) => (
        <Ticks key={run.id} run={run} cased={runLooks.get(run.id)?.cased ?? false} dead={isDead(run)} />
      ))}
      {scene.dots.map((dot, i) => {
        const dead = meetings.atDot[i]!.every((id) => runLooks.get(id)?.state === 'dead');
        return (
          <circle key={`${dot.x} ${dot.y}`} cx={dot.x} cy={dot.y} r={100} fill={dead ? 'var(--grey)' : 'var(--ink)'} />
        );
      })}
      {cores &&
        scene.parts.flatMap((part) =>
          part.terminals.map(({ mark, x, y }) => (
            <circle
              key={`${part.id} ${mark}`}
              cx={x}
              cy={y}
              r={150}
              fill="var(--paper)"
              {...inkOf(partLooks.get(part.id)?.state === 'dead')}
            />
          )),
        )}
      {scene.rings.map((ring) => {
        const beyond = ofWay(ring.part);
        const look = beyond.find(({ state }) => state === 'dead') ?? beyond[0];
        const dead = look?.state === 'dead';
        return (
          <g key={ring.part}>
            <circle
              cx={ring.x}
              cy={ring.y}
              r={ring.radius}
              fill="var(--paper)"
              {...inkOf(dead)}
              strokeDasharray={dead ? '10 95' : undefined}
            />
            <Lettering
              text={{
                x: ring.x,
                y: ring.y + 125,
                text: ring.text,
                size: 250,
                bold: !dead,
                anchor: 'middle',
                tone: dead ? 'grey' : 'ink',
              }}
            />
          </g>
        );
      })}
      {letters && (
        <>
          {scene.parts.map((part) => {
            const symbol = symbolById(part.symbol, part.width);
            return (symbol.texts ?? []).map((text) => {
              const at = turnedPoint(text.x, text.y, symbol, part.turn);
              return (
                <Lettering key={`${part.id} ${text.text}`} text={{ ...text, x: part.x + at.x, y: part.y + at.y }} />
              );
            });
          })}
          {scene.parts.map((part) => {
            const look = partLooks.get(part.id);
            const figure = look && !cores ? loadFigure(figures.parts[part.id]?.load, look) : undefined;
            return <PartTexts key={part.id} part={part} dead={look?.state === 'dead'} figure={figure} />;
          })}
          {scene.runs.map((run) => (
            <RunTexts key={run.id} run={run} dead={isDead(run)} />
          ))}
          <Letterings texts={scene.texts} />
          {!cores &&
            [...places].map(([id, place]) => {
              const source = parts.get(id)?.kind === 'supply' || parts.get(id)?.kind === 'inverter';
              const amps = figures.sources[id];
              if (source && amps === undefined) return null;
              const beyond = ofWay(id);
              const look = source ? undefined : (beyond.find(({ state }) => state === 'dead') ?? beyond[0]);
              if (!source && !look) return null;
              return (
                <FigurePair
                  key={id}
                  place={place}
                  volts={look?.volts ?? sourceVolts(id, figures, scene)}
                  amps={look?.amps ?? amps ?? 0}
                  dead={look?.state === 'dead'}
                />
              );
            })}
          {cores && scene.runs.map((run) => <CoreFigures key={run.id} run={run} look={runLooks.get(run.id)!} />)}
          {scene.parts.map((drawn) => (
            <StateWord key={drawn.id} drawn={drawn} part={parts.get(drawn.id)} look={partLooks.get(drawn.id)} />
          ))}
        </>
      )}
    </Layer>
  );
});

/** What a hand or a fault has done to a part, in a word beside it. */
function StateWord({ drawn, part, look }: { drawn: ScenePart; part: Part | undefined; look: PartLook | undefined }) {
  if (!part || !look?.moved || look.setting === undefined) return null;
  const word = look.tripped ? 'tripped' : settingWord(part, look.setting);
  return (
    <g
      style={{ paintOrder: 'stroke' }}
      stroke="var(--paper)"
      strokeWidth={130}
      strokeLinejoin="round"
      data-word={part.id}
    >
      <Lettering
        text={{
          x: drawn.x - 90,
          y: drawn.y + drawn.height / 2 + 60,
          text: word,
          size: SMALL,
          bold: true,
          anchor: 'end',
        }}
      />
    </g>
  );
}
