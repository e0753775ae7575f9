import type { Fault } from '../circuit/fault-types';
import { solveStanding } from '../circuit/steady';
import type { Installation } from '../document/schema';
import { buildGraph } from '../terminals/graph';
import { readFigures, type Figures } from './figures';
import { isolationOf, type Isolation } from './isolation';
import { restOf } from './rest';
import { isOpenSetting, type Settings } from './settings';
import { conditionOf, handlesOf, inCondition, withSettings, type ConditionName, type Stance } from './stance';
import { standingIn } from './standing';
import { openSetting, stillLive, type StillLive } from './still-live';
import { unheldIn, walkOf, type Unheld, type WalkOutcome } from './walk';

/** What one asks of a rehearsal: how the home is put, which faults are in it, which part is in hand. */
export interface Question {
  /** null: as it stands before anybody has touched it */
  stance: Stance | null;
  /** a condition to be laid over the stance; with a changeover its positions may follow, as the engine names them: `outage/B` */
  condition?: string;
  faults: readonly Fault[];
  hand: string | null;
}

/** The answer: plain data, so that a worker can send it. */
export interface Rehearsed {
  stance: Stance;
  /** where everything that can be operated stands */
  settings: Settings;
  rest: Settings;
  conditions: readonly ConditionName[];
  condition: ConditionName;
  mainSwitch: string | null;
  /** ids of inverters that run from their batteries */
  onBattery: readonly string[];
  figures: Figures;
  unheld: readonly Unheld[];
  /** null without a fault */
  outcome: WalkOutcome | null;
  hand: { stillLive: StillLive; isolation: Isolation } | null;
}

/** A home made ready to be rehearsed: what does not change from question to question is worked out once. */
export function createRehearsal(document: Installation): (question: Question) => Rehearsed {
  const graph = buildGraph(document);
  const rest = restOf(graph);
  const handles = handlesOf(graph);
  const isolations = new Map<string, Isolation>();

  return ({ stance: asked, condition: wanted, faults, hand }) => {
    let stance: Stance = asked ?? { supply: 'live', moved: {} };
    // An address may name what is no longer drawn.
    stance = { ...stance, moved: Object.fromEntries(Object.entries(stance.moved).filter(([id]) => id in rest)) };
    const [base, sides = ''] = (wanted ?? '').split('/') as [ConditionName, string?];
    if (handles.conditions.includes(base)) stance = inCondition(handles, rest, stance, base);
    const turned = handles.changeovers.flatMap(({ id }, i) => (sides[i] ? [[id, sides[i]] as const] : []));
    if (turned.length > 0) stance = withSettings(stance, rest, Object.fromEntries(turned));
    const settings = { ...rest, ...stance.moved };
    const condition = conditionOf(handles, rest, stance);
    const standing = standingIn(graph, settings, stance.supply, condition);
    const steady = solveStanding(graph, standing);
    const outcome = faults.length > 0 ? walkOf(graph, standing, faults) : null;

    const part = hand === null ? undefined : graph.parts.get(hand);
    const open = part && openSetting(part);
    const already = part !== undefined && isOpenSetting(settings[part.id]);
    const opened =
      part && open && !already ? standingIn(graph, { ...settings, [part.id]: open }, stance.supply, condition) : null;
    if (part && !isolations.has(part.id)) isolations.set(part.id, isolationOf(graph, part));
    return {
      stance,
      settings,
      rest,
      conditions: handles.conditions,
      condition,
      mainSwitch: handles.mainSwitch?.id ?? null,
      onBattery: [...standing.condition.onBattery].sort(),
      figures: readFigures(graph, steady),
      unheld: unheldIn(graph, steady),
      outcome,
      hand: part ? { stillLive: stillLive(graph, part, steady, opened), isolation: isolations.get(part.id)! } : null,
    };
  };
}
