import type { Mutation } from './edit';

export const DRAWING: readonly Mutation[] = [
  {
    rule: 'duplicate-ref',
    mistake: 'one designation on two breakers',
    make: (home) =>
      home
        .parts('mcb')
        .slice(1)
        .map((mcb) => home.set(mcb, { ref: home.parts('mcb')[0]!.ref! })),
  },
  {
    rule: 'unnamed-way',
    mistake: 'a way without a name',
    make: (home) =>
      home.ways.flatMap(({ device }) => {
        const part = home.part(device);
        return part.kind === 'mcb' ? [home.set(part, { label: undefined })] : [];
      }),
  },
  {
    rule: 'wrong-colour',
    mistake: 'the colour of earth on a line',
    make: (home) =>
      home.doc.wires.filter(({ role }) => role === 'line').map((wire) => home.setWire(wire, { colour: 'GNYE' })),
  },
  {
    rule: 'missing-data',
    mistake: 'a breaker without a rating',
    make: (home) => home.waysWith('lamp').map(({ device }) => home.set(device, { rating: undefined })),
  },
  {
    rule: 'missing-data',
    mistake: 'a run between rooms without a cable',
    make: (home) =>
      home.waysWith('lamp').flatMap(({ way }) =>
        home.doc.wires
          .filter(({ id, role, cable }) => role === 'line' && cable && way.wires.includes(id))
          .slice(0, 1)
          .map((wire) =>
            home.with({
              wires: home.doc.wires.map((one) => {
                const { cable: _gone, ...rest } = one;
                return one.id === wire.id ? rest : one;
              }),
            }),
          ),
      ),
  },
  {
    rule: 'unused-part',
    mistake: 'a lamp joined to nothing',
    make: (home) =>
      home.doc.places.map(({ id }) =>
        home.add({ id: 'mistake', kind: 'lamp', ref: 'E99', place: id, watts: 9, pf: 0.9, class: 2 }),
      ),
  },
  {
    rule: 'loose-wire',
    mistake: 'a wire to a part that is not there',
    make: (home) =>
      home.doc.wires
        .filter(({ role }) => role === 'switched')
        .map((wire) => home.setWire(wire, { to: ['nowhere', 'L'] })),
    also: ['open-line', 'open-terminal'],
  },
];
