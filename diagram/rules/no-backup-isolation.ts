import { polesOf } from '../document/kinds';
import type { Part, PartOf, Wire } from '../document/schema';
import { practices } from '../practices';
import { recalled } from './clauses';
import { sharedBy } from './readings/command';
import type { Context } from './context';
import { neutralFaultsOf } from './readings/neutral-faults';
import { once } from './readings/once';
import type { PointState } from '../circuit/evaluate';
import type { Remedy, Rule } from './types';
import { capital, say, sayParts } from './readings/words';

/** A two-pole breaker in the place of the single one, with the neutral of the inverter's output led through it. */
function twoPoles({ graph, document }: Context, inverter: Part, device: Part | undefined): Remedy[] {
  if (device?.kind !== 'mcb' && device?.kind !== 'isolator') return [];
  const leaving = document.wires.filter(({ from, to }) =>
    [from, to].some(([id, mark]) => id === inverter.id && mark === 'out.N'),
  );
  const id = `${device.id}.neutral`;
  if (polesOf(device) === 2 || leaving.length !== 1 || graph.wires.has(id)) return [];
  const [wire] = leaving as [Wire];
  const far = wire.from[0] === inverter.id ? wire.to : wire.from;
  const into: Wire = { ...wire, from: [inverter.id, 'out.N'], to: [device.id, '3'] };
  const onward: Wire = { ...wire, id, from: [device.id, '4'], to: far };
  const part = { ...device, poles: 2 } as PartOf<'mcb' | 'isolator'>;
  return [
    {
      label: 'Fit a two-pole breaker and lead the neutral through it',
      patch: { set: { parts: [part], wires: [into, onward] } },
    },
  ];
}

/**
 * By inverter: what it feeds on battery, with the names of those conditions. A load whose neutral is led astray goes round
 * the output's switch for that reason alone, and is named by the rules of neutrals: it is left out.
 */
const fedByBackup = once((context: Context): Map<string, { states: PointState[]; conditions: Set<string> }> => {
  const found = new Map<string, { states: PointState[]; conditions: Set<string> }>();
  const strays = new Set(
    (['lost', 'behind'] as const).flatMap((kind) => neutralFaultsOf(context, kind).flatMap(({ points }) => points)),
  );
  for (const { condition, points } of context.evaluated)
    for (const state of points.values()) {
      if (!state.fed || state.source?.kind !== 'backup' || strays.has(state.part.id)) continue;
      const { id } = state.source.part;
      const entry = found.get(id) ?? { states: [], conditions: new Set<string>() };
      entry.states.push(state);
      entry.conditions.add(condition.name);
      found.set(id, entry);
    }
  return found;
});

/** The output of a backup source that no one switch cuts off from everything it feeds. */
export const noBackupIsolation: Rule = {
  meta: {
    id: 'no-backup-isolation',
    severity: 'defect',
    group: 'backup',
    title: 'The backup source cannot be cut off in one action',
    clauses: [
      recalled('IEC 60364-5-53', '537.2'),
      recalled('IEC 60364-4-46', '462.2'),
      recalled('IEC 60364-5-55', '551.6'),
    ],
    lesson:
      'The main switch does not stop an inverter: it starts because of it. Whoever works on the board needs one ' +
      'handle that cuts the backup off from everything, line and neutral, and can be locked; the button on the ' +
      'inverter is none.',
    remedy: "Put a two-pole breaker or isolator at the inverter's output, before anything branches off.",
  },
  *check(context) {
    const poles = practices[context.practice].backupIsolationPoles.value;
    for (const [id, { states, conditions }] of fedByBackup(context)) {
      const shared = sharedBy(context, states);
      // One neutral that is led past it is a crossed neutral and said as such; the device is there.
      const cutsBoth = shared.filter((device) =>
        states.some(({ neutralDevices }) => neutralDevices.includes(device.id)),
      );
      if (poles === 1 ? shared.length > 0 : cutsBoth.length > 0) continue;
      const single = shared[0];
      const inverter = context.graph.parts.get(id)!;
      yield {
        heading: `${capital(say(context, id))} cannot be cut off in one action`,
        message: single
          ? `${capital(say(context, single.id))} cuts the line of all that ${say(context, id)} feeds, but not its neutral.`
          : `No one switch or breaker lies between ${say(context, id)} and all of ${sayParts(
              context,
              states.map(({ part }) => part.id),
              4,
            )}.`,
        parts: [id, ...(single ? [single.id] : [])],
        conditions: [...conditions],
        get remedies() {
          return twoPoles(context, inverter, single);
        },
      };
    }
  },
};
