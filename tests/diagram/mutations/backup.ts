import type { Home, Mutation } from './edit';

const inverters = (home: Home) => home.parts('inverter');
const batteries = (home: Home) => home.parts('battery');

export const BACKUP: readonly Mutation[] = [
  {
    rule: 'backup-overload',
    mistake: 'an inverter far too small',
    make: (home) => inverters(home).map((inverter) => home.set(inverter, { va: 40, surge: 4000 })),
  },
  {
    rule: 'backup-surge',
    mistake: 'an inverter that cannot start a fan',
    make: (home) =>
      home.waysWith('fan', true).length > 0
        ? inverters(home).map((inverter) => home.set(inverter, { surge: 100 }))
        : [],
  },
  {
    rule: 'short-autonomy',
    mistake: 'more hours asked than the bank gives',
    make: (home) => inverters(home).map((inverter) => home.set(inverter, { hoursWanted: 72 })),
  },
  {
    rule: 'no-battery-fuse',
    mistake: 'no fuse at the battery',
    make: (home) =>
      home
        .parts('fuse')
        .filter(({ standard }) => standard === 'dc')
        .map(({ id }) => home.takeOut(id, ['1', '2'])),
  },
  {
    rule: 'battery-reversed',
    mistake: 'the leads of the battery crossed',
    make: (home) =>
      batteries(home).map((battery) => {
        const cross = ([id, mark]: [string, string]): [string, string] => [
          id,
          id === battery.id ? (mark === '+' ? '-' : '+') : mark,
        ];
        return home.with({
          wires: home.doc.wires.map((wire) => ({ ...wire, from: cross(wire.from), to: cross(wire.to) })),
        });
      }),
    also: ['no-battery-fuse'],
  },
  {
    rule: 'thin-battery-lead',
    mistake: 'a battery lead of 2.5 mm2',
    make: (home) =>
      home.doc.wires
        .filter(({ role, cable }) => role.startsWith('dc') && cable !== undefined)
        .map(({ cable }) => home.setCable(cable!, { csa: 2.5 })),
  },
  {
    rule: 'charger-overload',
    mistake: 'a charger of 1 C',
    make: (home) =>
      batteries(home).flatMap(({ ah }) => inverters(home).map((inverter) => home.set(inverter, { charge: ah! }))),
    also: ['overloaded-way', 'undersized-cable', 'high-drop', 'overloaded-main'],
  },
  {
    rule: 'charger-overload',
    mistake: 'a charger that never fills the bank',
    make: (home) => inverters(home).map((inverter) => home.set(inverter, { charge: 1 })),
  },
  {
    rule: 'battery-place',
    mistake: 'a flooded battery where somebody sleeps',
    make: (home) =>
      batteries(home).map((battery) => {
        const places = home.doc.places.map((place) =>
          place.id === battery.place ? { ...place, sleeping: true, ventilated: false } : place,
        );
        return home.set(battery, { chemistry: 'flooded' }).with({ places });
      }),
    also: ['short-autonomy'],
  },
  {
    rule: 'no-backup-isolation',
    mistake: 'an outlet hung on the inverter before its output breaker',
    make: (home) =>
      inverters(home).map(({ id, place }) =>
        home
          .add({ id: 'mistake', kind: 'socket', ref: 'X99', rating: 6, load: 10, ...(place && { place }) })
          .join('line', [id, 'out.L'], ['mistake', 'L'])
          .join('neutral', [id, 'out.N'], ['mistake', 'N'])
          .join('earth', [id, 'out.E'], ['mistake', 'E']),
      ),
    also: ['no-overcurrent', 'rcd-idle-on-backup', 'no-rcd', 'slow-disconnection', 'heavy-socket-on-light-way'],
  },
];
