import { externalOhm, deviceOf } from '../circuit/way-faults';
import { ohms, seconds } from './readings/amounts';
import { recalled, seen } from './clauses';
import { figuresOf, onMains } from './readings/figures';
import { lackOf, lackOfCables, lackOfRating, lackOfSupply } from './readings/lacking';
import { bySupply, remediesOf, slowWays, type SlowWay } from './readings/slow-ways';
import type { Rule } from './types';
import { capital, inOrder, say, sayParts } from './readings/words';

/**
 * Zs at the far end against the limit of the device: only on mains. On battery an inverter drives no more than a few times
 * its rating: through the earth cores of a home that stays far below 50 V at any case, and whether its rcds work there is
 * the business of `rcd-idle-on-backup` and `no-earth-reference-on-backup`.
 */
export const slowDisconnection: Rule = {
  meta: {
    id: 'slow-disconnection',
    severity: 'danger',
    group: 'shock',
    title: 'A fault to earth is not cleared in time',
    clauses: [
      seen('IEC 60364-4-41', '411.3.2.2 to 411.3.2.4'),
      recalled('IEC 60364-4-41', '411.4.4'),
      seen('IEC 60364-4-41', '411.5.3'),
      seen('BS 7671', 'Table 41.1'),
    ],
    lesson:
      'When a line touches a case, the earth core must carry enough current to open the breaker before a hand on ' +
      'the case comes to harm. A long thin run, a large breaker or a poor earth outside make the current too ' +
      'small: the case stays live and the breaker holds.',
    remedy: 'Put the way behind an rcd, fit a device with a lower trip, or pull a thicker cable.',
  },
  *check(context) {
    const slow = slowWays(context);
    const { document, graph } = context;
    const told = (way: SlowWay) =>
      way.fault.clearedS === null ? 'nothing opens' : `it takes ${seconds(way.fault.clearedS)}`;
    const shared = slow.filter((way) => bySupply(context, way));
    if (shared.length > 0) {
      const ids = inOrder(
        context,
        shared.map(({ device }) => device.id),
      ).map(({ id }) => id);
      const supply = [...graph.parts.values()].find(
        ({ kind }) => kind === (document.supply.system === 'TT' ? 'electrode' : 'supply'),
      );
      yield {
        heading: `${capital(sayParts(context, ids, 4))} cannot clear a fault to earth`,
        message:
          `The ${document.supply.system === 'TT' ? 'electrode' : 'loop of the supply'} alone is ${ohms(externalOhm(document.supply)!)}; at most ` +
          `${ohms(Math.min(...shared.map(({ fault }) => fault.zsMax!)))} lets these devices open in time. Put the ways behind an rcd.`,
        parts: [...ids, ...(supply ? [supply.id] : [])],
        conditions: onMains(context),
        remedies: shared.length === 1 ? remediesOf(context, shared[0]!) : [],
      };
    }
    for (const way of slow.filter((each) => !shared.includes(each))) {
      const { device, fault, at } = way;
      const limit = fault.zsMax === null ? '' : `; ${ohms(fault.zsMax)} is the most for ${seconds(fault.withinS)}`;
      yield {
        heading: `${capital(say(context, device.id))} clears a fault too slowly`,
        message:
          `A fault to earth at ${sayParts(context, [at.id])} meets ${ohms(fault.zs)}${limit}. At ${Math.round(fault.faultA)} A ` +
          `${told(way)}, and the case stays live.`,
        parts: [device.id, at.id],
        conditions: onMains(context),
        remedies: remediesOf(context, way),
      };
    }
  },
  *lacks(context) {
    const { document } = context;
    const { supply } = document;
    const { drawn, ways, earth } = figuresOf(context);
    const onTheMains = drawn.filter(({ source }) => source?.kind === 'mains');
    if (externalOhm(supply) === undefined && onTheMains.length > 0) {
      if (supply.system !== 'TT') yield* lackOfSupply(context, 'the earth fault loop');
      else
        for (const part of context.parts('supply').slice(0, 1))
          yield { parts: [part.id], what: 'the resistance of the earth electrode' };
    }
    const edges = new Set<number>();
    for (const each of onTheMains) {
      const path = earth.path(context.graph.node(each.part.id, each.isPoint ? 'E' : 'in.E'));
      for (const number of [...(path ? [...each.lineEdges, ...path] : [])]) edges.add(number);
    }
    yield* lackOfCables(
      context,
      [...edges].sort((a, b) => a - b),
    );
    for (const { device, fault, inA } of ways.values()) {
      if (fault === null || fault.holds) continue;
      if (inA === null) yield lackOfRating(context, device);
      else if (deviceOf(device) === null) yield lackOf(context, device, 'the type B, C or D');
    }
  },
};
