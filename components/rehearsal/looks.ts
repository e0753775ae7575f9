import type { Part } from '@/diagram/document/schema';
import type { SceneRun } from '@/diagram/layout/scene';
import type { Figures, State } from '@/diagram/rehearsal/figures';
import { settingsOf, isOpenSetting, type Setting, type Settings } from '@/diagram/rehearsal/settings';

/** How a part or run is drawn now. Never by colour alone: dotted, cased, ringed, worded. */
export interface RunLook {
  state: State;
  /** fed by a battery now */
  cased: boolean;
  volts: number;
  amps: number;
}

export interface PartLook {
  state: State;
  cased: boolean;
  /** draws current: has a ring */
  works: boolean;
  setting: Setting | undefined;
  /** the walk has opened it */
  tripped: boolean;
  /** stands otherwise than at rest */
  moved: boolean;
}

const rank: Readonly<Record<State, number>> = { live: 3, return: 2, plain: 1, dead: 0 };

/** The look of a run: that of its line where it has one, else of what it is. */
export function runLook(run: SceneRun, figures: Figures, inverters: ReadonlySet<string>): RunLook {
  const wires = run.wires.flatMap((id) => figures.wires[id] ?? []);
  const best = [...wires].sort((a, b) => rank[b.state] - rank[a.state])[0];
  if (!best) return { state: 'plain', cased: false, volts: 0, amps: 0 };
  return {
    state: best.state,
    cased: wires.some(({ from }) => from.some((id) => inverters.has(id))),
    volts: best.volts,
    amps: wires.reduce((most, { amps, state }) => (state === best.state ? Math.max(most, amps) : most), 0),
  };
}

export function partLook(
  part: Part,
  figures: Figures,
  settings: Settings,
  rest: Settings,
  opened: readonly string[],
  inverters: ReadonlySet<string>,
): PartLook {
  const now = figures.parts[part.id];
  const tripped = opened.includes(part.id);
  const setting = tripped ? settingsOf(part).find(isOpenSetting) : settings[part.id];
  return {
    state: now?.state ?? 'plain',
    cased: now?.from.some((id) => inverters.has(id)) ?? false,
    works: now?.load?.works ?? false,
    setting,
    tripped,
    moved: setting !== rest[part.id],
  };
}

/** Amperes beneath a symbol, four characters at most: "43mA", ".24A", "2.6A", "11A". */
export function tightAmps(amps: number): string {
  if (amps < 0.0995) return `${Math.round(amps * 1000)}mA`;
  if (amps < 0.995) return `${amps.toFixed(2).slice(1)}A`;
  return amps < 9.95 ? `${amps.toFixed(1)}A` : `${Math.round(amps)}A`;
}
