import type { Wire } from '@/diagram/document/schema';
import type { Home, Mutation } from './edit';

/** The neutral bar or other collector of a way: where the neutral of its first run starts. */
const neutralRun = (home: Home, parts: readonly string[], wires: readonly string[]): Wire | undefined =>
  home.doc.wires.find(
    ({ id, role, from, to }) =>
      role === 'neutral' && wires.includes(id) && !parts.includes(from[0]) && parts.includes(to[0]),
  );

/** Every way of a side with the wire that brings its neutral from the bar. */
const runs = (home: Home, backup: boolean) =>
  home.ways.flatMap((way) => {
    const run = way.backup === backup ? neutralRun(home, way.parts, way.wires) : undefined;
    return run ? [{ way, run, bar: run.from[0] }] : [];
  });

/** Pairs of outlets on different mains ways. */
const twoOutlets = (home: Home) => {
  const ways = home.waysWith('socket');
  return ways.slice(1).map((way, i) => [ways[i]!.parts[0]!, way.parts[0]!] as const);
};

/** A lead from an outlet of the backup to a plug. */
const lead = (home: Home, inSocket: string | undefined): Home[] =>
  home.waysWith('socket', true).map(({ parts: [outlet] }) => {
    const plugged = home.add({
      id: 'mistake',
      kind: 'plug',
      ref: 'X99',
      ...(outlet!.place && { place: outlet!.place }),
      ...(inSocket && { in: inSocket }),
    });
    return (['L', 'N', 'E'] as const).reduce(
      (drawn, mark) =>
        drawn.join(mark === 'L' ? 'line' : mark === 'N' ? 'neutral' : 'earth', [outlet!.id, mark], ['mistake', mark]),
      plugged,
    );
  });

export const SEPARATION: readonly Mutation[] = [
  {
    rule: 'mixed-feeds',
    mistake: 'the lines of two ways joined at their outlets',
    make: (home) => twoOutlets(home).map(([a, b]) => home.join('line', [a.id, 'L'], [b.id, 'L'])),
    also: ['residual-imbalance', 'crowded-terminal'],
  },
  {
    rule: 'backfeed',
    mistake: 'a lead from the backup plugged into an outlet of the mains',
    make: (home) =>
      home
        .waysWith('socket')
        .slice(0, 1)
        .flatMap(({ parts }) => lead(home, parts[0]!.id)),
    also: [
      'live-pins',
      'mixed-feeds',
      'backup-neutral-lost',
      'borrowed-neutral',
      'residual-imbalance',
      'backup-neutral-behind-other-rcd',
      'missing-data',
    ],
  },
  {
    rule: 'live-pins',
    mistake: 'a lead with a plug at its free end',
    make: (home) => lead(home, undefined),
  },
  {
    rule: 'borrowed-neutral',
    mistake: 'the neutral of a way led back through the joint of another way',
    make: (home) =>
      runs(home, false).flatMap(({ way, run, bar }) => {
        const other = runs(home, false).find(
          (one) => one.bar === bar && one.way.device !== way.device && home.part(one.run.to[0]).kind === 'joint',
        );
        return other ? [home.setWire(run, { from: home.freeOn(other.run.to[0]) })] : [];
      }),
  },
  {
    rule: 'residual-imbalance',
    mistake: 'the neutral of an rcd wired from the wrong end',
    make: (home) =>
      home.parts('rcd').flatMap(({ id }) => {
        const [into, out] = [home.only(id, '3'), home.only(id, '4')];
        if (!into || !out) return [];
        const turn = (wire: Wire, mark: string): Partial<Wire> =>
          wire.from[0] === id ? { from: [id, mark] } : { to: [id, mark] };
        return [home.setWire(into, turn(into, '4')).setWire(out, turn(out, '3'))];
      }),
    also: ['backup-neutral-behind-other-rcd'],
  },
  {
    rule: 'residual-imbalance',
    mistake: 'the neutral of a way landed before the rcd that its line passes',
    make: (home) =>
      runs(home, false).flatMap(({ run, bar }) => {
        const feeder = home.wiresAt(bar).find(({ to }) => to[0] === bar);
        const rcd = feeder && home.part(feeder.from[0]);
        const before = rcd?.kind === 'rcd' ? home.wiresAt(rcd.id, '3')[0] : undefined;
        const source = before && home.far(before, rcd!.id);
        return source && home.part(source[0]).kind === 'neutral-bar'
          ? [home.setWire(run, { from: home.freeOn(source[0]) })]
          : [];
      }),
  },
  {
    rule: 'backup-neutral-behind-other-rcd',
    mistake: 'the neutral of a backed-up way landed at the inverter, before the rcd of its line',
    make: (home) =>
      runs(home, true).map(({ run }) => home.setWire(run, { from: [home.parts('inverter')[0]!.id, 'out.N'] })),
  },
  {
    rule: 'backup-neutral-lost',
    mistake: 'the neutral of a backed-up way landed on a bar of the mains',
    make: (home) =>
      runs(home, true).flatMap(({ run }) =>
        runs(home, false)
          .slice(0, 1)
          .map(({ bar }) => home.setWire(run, { from: home.freeOn(bar) })),
      ),
  },
  {
    rule: 'two-sources-unmarked',
    mistake: 'no notice at the switchboards of two sources',
    make: (home) => (home.doc.notices?.length ? [home.with({ notices: [] })] : []),
  },
  {
    rule: 'shared-box-lines',
    mistake: 'the switch of an appliance put into a switchboard whose ways have another rcd',
    make: (home) => {
      const barOf = (part: string) => {
        const way = home.ways.find(({ backup, parts }) => !backup && parts.includes(part));
        return way && home.wiresAt(way.device, '1')[0]!.from[0];
      };
      return home.doc.supply.system === 'TT'
        ? []
        : home.parts('switch-2pole').flatMap((control) => {
            const box = home
              .parts('switch')
              .find(
                ({ id, board }) => board !== undefined && barOf(id) !== undefined && barOf(id) !== barOf(control.id),
              );
            return box ? [home.set(control, { place: box.place!, board: box.board! })] : [];
          });
    },
    also: ['missing-data'],
  },
];
