import type { Home, Mutation } from './edit';

const MORE_LOAD = ['overloaded-main', 'high-drop', 'undersized-cable', 'backup-overload', 'rcd-underrated'];

const cablesOf = (home: Home, wires: readonly string[]): string[] => [
  ...new Set(home.doc.wires.filter(({ id }) => wires.includes(id)).flatMap(({ cable }) => (cable ? [cable] : []))),
];

export const OVERLOAD: readonly Mutation[] = [
  {
    rule: 'no-overcurrent',
    mistake: 'no breaker at the output of the inverter',
    make: (home) =>
      home
        .parts('inverter')
        .flatMap(({ id }) => home.wiresAt(id, 'out.L').map((wire) => home.far(wire, id)[0]))
        .flatMap((id) => (home.part(id).kind === 'mcb' ? [home.takeOut(id, ['1', '2'], ['3', '4'])] : [])),
    also: ['no-backup-isolation'],
  },
  {
    rule: 'no-overcurrent',
    mistake: 'no service fuse',
    make: (home) => home.parts('fuse').flatMap((fuse) => (fuse.standard === 'dc' ? [] : [home.takeOut(fuse.id, ['1', '2'])])),
  },
  {
    rule: 'mixed-feeds',
    mistake: 'a line led round an rcd',
    make: (home) =>
      home.parts('rcd').flatMap(({ id }) => {
        const [into, out] = [home.only(id, '1'), home.only(id, '2')];
        return into && out ? [home.join('line', home.beside(home.far(into, id)), home.beside(home.far(out, id)))] : [];
      }),
  },
  {
    rule: 'overloaded-way',
    mistake: 'more load than the way was made for',
    make: (home) =>
      [...home.waysWith('lamp'), ...home.waysWith('appliance')].map(({ device, parts }) =>
        home.set(parts[0]!, { watts: 5 * device.rating! * 230 }),
      ),
    also: MORE_LOAD,
  },
  {
    rule: 'undersized-cable',
    mistake: 'a larger breaker on the same cable',
    make: (home) =>
      [...home.waysWith('lamp'), ...home.waysWith('appliance')].map(({ device }) => home.set(device, { rating: 63 })),
    also: ['slow-disconnection', 'thin-earth'],
  },
  {
    rule: 'high-drop',
    mistake: 'a run of kilometres',
    make: (home) =>
      [...home.waysWith('lamp'), ...home.waysWith('appliance')].flatMap(({ way }) =>
        cablesOf(home, way.wires)
          .slice(0, 1)
          .map((id) => home.setCable(id, { length: 9999 })),
      ),
    also: ['slow-disconnection'],
  },
  {
    rule: 'weak-breaking-capacity',
    mistake: 'a breaker that cannot break what the supply gives',
    make: (home) => home.waysWith('lamp').map(({ device }) => home.set(device, { icn: 200 })),
  },
  {
    rule: 'overloaded-main',
    mistake: 'a service fuse of 2 A',
    make: (home) =>
      home
        .parts('fuse')
        .filter(({ standard }) => standard === 'gG')
        .map((fuse) => home.set(fuse, { rating: 2 })),
  },
  {
    rule: 'rcd-underrated',
    mistake: 'an rcd rated below the fuse before it and the ways behind it',
    make: (home) =>
      home.parts('rcd').flatMap((rcd) => {
        const bar = home
          .wiresAt(rcd.id, '2')
          .map((wire) => home.far(wire, rcd.id)[0])
          .find((id) => home.part(id).kind === 'line-bar');
        const behind = home
          .parts('mcb')
          .filter(({ id }) => bar !== undefined && home.wiresAt(id, '1').some((wire) => home.far(wire, id)[0] === bar));
        const fuse = home.parts('fuse').find(({ standard }) => standard === 'gG')!;
        const sum = behind.reduce((total, { rating }) => total + rating!, 0);
        return behind.length > 1 && !home.ways.some(({ device, backup }) => backup && device === behind[0]!.id)
          ? [home.set(rcd, { rating: Math.min(sum, fuse.rating!) - 1 })]
          : [];
      }),
  },
  {
    rule: 'single-pole-main',
    mistake: 'a main switch that leaves the neutral closed',
    make: (home) =>
      home.parts('isolator').map((main) => {
        const [before] = home.wiresAt(main.id, '3');
        const source = home.far(before!, main.id);
        const past = home
          .wiresAt(main.id, '4')
          .reduce(
            (drawn, wire) => drawn.setWire(wire, { from: source, to: home.far(wire, main.id) }),
            home.cut(before!),
          );
        return past.set(main, { poles: 1 });
      }),
  },
  {
    rule: 'no-main-switch',
    mistake: 'no main switch, and several feeders behind the meter',
    make: (home) =>
      home.doc.supply.system === 'TT' || home.parts('line-bar').length < 3
        ? []
        : home.parts('isolator').map(({ id }) => home.takeOut(id, ['1', '2'], ['3', '4'])),
  },
  {
    rule: 'no-selectivity',
    mistake: 'a main rcd without delay before the others',
    make: (home) =>
      home
        .parts('rcd')
        .filter(({ delay }) => delay === 'S')
        .map((rcd) => home.set(rcd, { delay: 'none' })),
  },
  {
    rule: 'wrong-curve',
    mistake: 'an appliance whose start trips its breaker',
    make: (home) => home.waysWith('appliance').map(({ parts }) => home.set(parts[0]!, { surge: 20 })),
  },
  {
    rule: 'heavy-socket-on-light-way',
    mistake: 'an outlet of 63 A',
    make: (home) => home.parts('socket').map((socket) => home.set(socket, { rating: 63 })),
  },
  {
    rule: 'regulator-feeds-other',
    mistake: "a lamp joined behind a fan's regulator",
    make: (home) =>
      home.parts('regulator').flatMap((regulator) => {
        const lamp = home.parts('lamp').find(({ id, place }) => place === regulator.place && home.only(id, 'L'));
        return lamp ? [home.setWire(home.only(lamp.id, 'L')!, { from: [regulator.id, '2'] })] : [];
      }),
    also: [
      'open-terminal',
      'mixed-feeds',
      'borrowed-neutral',
      'residual-imbalance',
      'backup-neutral-lost',
      'backup-neutral-behind-other-rcd',
    ],
  },
  {
    rule: 'too-many-points',
    mistake: 'more watts on a way of lamps than the practice allows',
    make: (home) =>
      home.doc.practice === 'IN' ? home.waysWith('lamp').map(({ parts }) => home.set(parts[0]!, { watts: 900 })) : [],
  },
  {
    rule: 'no-spd',
    mistake: 'no surge arrester',
    make: (home) => home.parts('spd').map(({ id }) => home.takeOut(id)),
  },
];
