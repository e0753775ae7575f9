import { isResidual } from '../terminals/roles-of-parts';
import { recalled } from './clauses';
import type { Context } from './context';
import { bareOf, barePoints, guardsOf, onOwnRod, DUTY_NAME, type Duty } from './readings/rcd-duty';
import { rcboInPlace } from './readings/rcbo-remedy';
import { changePart } from './readings/remedies';
import type { Lack, Remedy, Rule, Severity } from './types';
import { capital, inOrder, sayParts } from './readings/words';

interface Unguarded {
  severity: Severity;
  of: Duty['of'];
  sensitivityA: number;
  ways: Set<string>;
  points: Set<string>;
  conditions: Set<string>;
}

/** Points that must lie behind an rcd on mains and do not, together where the same duty and severity asks for it. */
function unguarded(context: Context): Unguarded[] {
  const found = new Map<string, Unguarded>();
  const told = (duty: Duty): Severity =>
    duty.of === 'wet' || duty.of === 'tt' || context.document.supply.system === 'TT' ? 'danger' : 'defect';
  context.evaluated.forEach(({ condition, otherwise }, i) => {
    if (condition.base !== 'mains') return;
    const others = [...otherwise.values()].flat().flatMap((state) => bareOf(context, state));
    for (const { state, duty } of [...barePoints(context)[i]!, ...others]) {
      if (state.source?.kind !== 'mains') continue;
      const severity = told(duty);
      const key = `${severity} ${duty.of}`;
      const entry = found.get(key) ?? {
        severity,
        of: duty.of,
        sensitivityA: duty.sensitivityA,
        ways: new Set(),
        points: new Set(),
        conditions: new Set(),
      };
      if (state.overcurrent) entry.ways.add(state.overcurrent);
      entry.points.add(state.part.id);
      entry.conditions.add(condition.name);
      found.set(key, entry);
    }
  });
  return [...found.values()];
}

/** One way takes an rcbo; an rcd that is there and too coarse takes a finer one. */
function guard(context: Context, ways: readonly string[], points: ReadonlySet<string>): Remedy[] {
  const coarse = new Set(
    context.evaluated.flatMap(({ points: states }) =>
      [...points].flatMap((id) => guardsOf(context, states.get(id)!).map((device) => device.id)),
    ),
  );
  const finer = [...coarse].flatMap((id) => {
    const device = context.graph.parts.get(id)!;
    return device.kind === 'rcd' && device.delay !== 'S'
      ? [changePart(`Make ${context.name(id)} one of 30 mA`, device, { sensitivity: 0.03 })]
      : [];
  });
  return [...finer, ...(ways.length === 1 ? rcboInPlace(context, ways[0]!) : [])];
}

const milliamps = (amps: number): string => `${Math.floor(amps * 1000 + 1e-6)} mA`;

/** A socket, wet place, household lighting (GB) or any circuit on TT without an rcd before it. */
export const noRcd: Rule = {
  meta: {
    id: 'no-rcd',
    severity: 'defect',
    group: 'shock',
    title: 'No rcd guards this circuit',
    clauses: [
      recalled('IEC 60364-4-41', '411.3.3'),
      recalled('BS 7671', '411.3.4'),
      recalled('IEC 60364-4-41', '411.5.3'),
    ],
    lesson:
      'A breaker opens at many amperes; a heart stops at some hundredths of one. Only an rcd of 30 mA sees the current that flows ' +
      'through a person, and on TT it is the only device that clears a fault to earth at all.',
    remedy: 'Put the way behind an rcd, or fit an rcbo in place of its mcb.',
  },
  *check(context) {
    for (const { severity, of, sensitivityA, ways, points, conditions } of unguarded(context)) {
      const devices = inOrder(context, ways).map(({ id }) => id);
      const names = sayParts(context, points);
      const limit = sensitivityA === Infinity ? '' : ` of ${milliamps(sensitivityA)} or less`;
      yield {
        severity,
        heading: `${capital(sayParts(context, devices.length > 0 ? devices : points))} without rcd`,
        message: `${capital(DUTY_NAME[of])} must lie behind an rcd${limit}; on mains nothing of the kind lies before ${names}. A person who touches a fault is not saved.`,
        parts: [...devices, ...inOrder(context, points).map(({ id }) => id)],
        conditions: [...conditions],
        get remedies() {
          return guard(context, devices, points);
        },
      };
    }
  },
  *lacks(context: Context): Iterable<Lack> {
    const { parts, document, name } = context;
    for (const device of [...parts('rcd'), ...parts('rcbo')])
      if (isResidual(device) && device.sensitivity === undefined)
        yield { parts: [device.id], what: `the sensitivity of ${name(device)}` };
    const supply = parts('supply')[0];
    const byRod = document.supply.system === 'TT' || onOwnRod(context).size > 0;
    if (byRod && document.supply.ra === undefined)
      yield { parts: supply ? [supply.id] : [], what: 'the resistance of the earth electrode' };
  },
};
