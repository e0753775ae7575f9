import { memo } from 'react';
import { Layer } from '@/components/sheet/canvas/layer';
import { Lettering, Letterings } from '@/components/sheet/canvas/lettering';
import { INK } from '@/components/sheet/canvas/units';
import type { Point, Scene, ScenePart, SceneRun, SceneText } from '@/diagram/layout/scene';
import type { Figures } from '@/diagram/rehearsal/figures';
import { settingWord } from '@/diagram/rehearsal/settings';
import { ampText, voltText } from '@/diagram/rehearsal/words';
import { symbolById } from '@/diagram/symbols';
import { turnedPoint } from '@/diagram/symbols/turn';
import { STROKE } from '@/diagram/symbols/types';
import type { Part } from '@/diagram/document/schema';
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

/** The texts of a part as they read now: beneath a load its amperes, or 0 V, stand in the place of its rating. */
function textsOf(part: ScenePart, look: PartLook, figures: Figures): SceneText[] {
  const load = figures.parts[part.id]?.load;
  const dead = look.state === 'dead';
  let written = false;
  return part.texts.map((text) => {
    const grey = dead ? { ...text, tone: 'grey' as const } : text;
    if (!load || text.bold || written) return load && written && !text.bold ? { ...grey, text: '' } : grey;
    written = true;
    const now = look.works ? tightAmps(load.amps) : voltText(load.volts).replace(' V', dead ? ' V' : 'V');
    return { ...grey, text: now };
  });
}

/** Volts and amperes of a way, beside its number. */
function WayFigures({ x, y, look }: { x: number; y: number; look: RunLook }) {
  if (look.state === 'dead') return <Lettering text={{ x, y: y + 80, text: '0 V', size: SMALL, tone: 'grey' }} />;
  return (
    <>
      <Lettering text={{ x, y: y - 60, text: voltText(look.volts), size: SMALL, bold: true }} />
      <Lettering
        text={{ x, y: y + 260, text: look.amps < 0.0005 ? '0 A' : tightAmps(look.amps), size: SMALL, bold: true }}
      />
    </>
  );
}

/** Volts and amperes of a core on its longest stretch, where that is long enough. */
function CoreFigures({ run, look }: { run: SceneRun; look: RunLook }) {
  const stretches = run.points.slice(1).map((b, i) => ({ a: run.points[i]!, b }));
  const length = ({ a, b }: { a: Point; b: Point }) => Math.abs(a.x - b.x) + Math.abs(a.y - b.y);
  const longest = stretches.sort((p, q) => length(q) - length(p))[0];
  if (!longest || length(longest) < 1900 || look.state === 'plain') return null;
  const x = (longest.a.x + longest.b.x) / 2;
  const y = (longest.a.y + longest.b.y) / 2;
  const upright = longest.a.x === longest.b.x;
  const text =
    look.state === 'dead'
      ? '0 V'
      : look.state === 'return'
        ? ampText(look.amps)
        : `${voltText(look.volts)} ${ampText(look.amps)}`;
  return (
    <g style={{ paintOrder: 'stroke' }} stroke="var(--paper)" strokeWidth={110} strokeLinejoin="round">
      <Lettering
        text={{
          x,
          y: y + 80,
          text,
          size: 200,
          anchor: 'middle',
          tone: look.state === 'dead' ? 'grey' : 'ink',
          ...(upright && { turn: 3 as const, x: x + 70, y }),
        }}
      />
    </g>
  );
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
  const ofWay = (device: string) =>
    scene.runs.filter(({ from, to }) => from[0] === device || to[0] === device).map(({ id }) => runLooks.get(id)!);
  return (
    <Layer scene={scene} level={2} name="marks">
      {scene.runs.map((run) => (
        <Ticks key={run.id} run={run} cased={runLooks.get(run.id)?.cased ?? false} dead={isDead(run)} />
      ))}
      {scene.dots.map((dot) => {
        const dead = scene.runs.filter((run) => liesOn(dot, run)).every(isDead);
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
            {letters && !cores && look && <WayFigures x={ring.x + ring.radius + 90} y={ring.y} look={look} />}
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
            return <Letterings key={part.id} texts={look ? textsOf(part, look, figures) : part.texts} />;
          })}
          {scene.runs.map((run) => (
            <Letterings
              key={run.id}
              texts={isDead(run) ? run.texts.map((text) => ({ ...text, tone: 'grey' })) : run.texts}
            />
          ))}
          <Letterings texts={scene.texts} />
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
