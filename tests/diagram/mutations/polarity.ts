import type { End, Part } from '@/diagram/document/schema';
import type { Home, Mutation } from './edit';

const control = (place: string | undefined): Part => ({
  id: 'mistake',
  kind: 'switch',
  ref: 'S99',
  rating: 16,
  ...(place && { place }),
});
const loads = (home: Home) => [...home.parts('lamp'), ...home.parts('fan'), ...home.parts('appliance')];
const points = (home: Home) => [...loads(home), ...home.parts('socket')];
const isEarthed = (part: Part) => part.kind === 'socket' || !('class' in part && part.class === 2);
/** Lamps on a switch of their own. */
const switched = (home: Home) =>
  home.parts('lamp').flatMap((lamp) => {
    const line = home.only(lamp.id, 'L');
    const end = line && home.far(line, lamp.id);
    const control = end && home.part(end[0]);
    return line && control?.kind === 'switch' ? [{ lamp, line, control }] : [];
  });

/** The wires at one terminal of the supply on another of it; where the supply has none such, nothing. */
const moveAtSupply = (home: Home, from: string, to: string): Home[] =>
  home
    .parts('supply')
    .filter(() => home.doc.supply.system !== 'TT' || (from !== 'E' && to !== 'E'))
    .flatMap(({ id }) => {
      const wire = home.only(id, from);
      const end: End = [id, to];
      return wire ? [home.setWire(wire, wire.from[0] === id ? { from: end } : { to: end })] : [];
    });

export const POLARITY: readonly Mutation[] = [
  {
    rule: 'switched-neutral',
    mistake: 'a switch in the neutral of a load',
    make: (home) =>
      loads(home).flatMap((load) =>
        home
          .wiresAt(load.id, 'N')
          .filter(({ to }) => to[0] === load.id)
          .map((wire) => home.insert(wire, control(load.place))),
      ),
  },
  {
    rule: 'fused-neutral',
    mistake: 'a fuse in the neutral of a load',
    make: (home) =>
      points(home).flatMap((load) =>
        home
          .wiresAt(load.id, 'N')
          .filter(({ to }) => to[0] === load.id)
          .map((wire) =>
            home.insert(wire, {
              id: 'mistake',
              kind: 'fuse',
              ref: 'F99',
              rating: 10,
              standard: 'gG',
              ...(load.place && { place: load.place }),
            }),
          ),
      ),
  },
  {
    rule: 'reversed-polarity',
    mistake: 'line and neutral crossed at a load',
    make: (home) =>
      points(home).map((load) => {
        const cross = ([id, mark]: [string, string]): [string, string] => [
          id,
          id === load.id ? ({ L: 'N', N: 'L' }[mark] ?? mark) : mark,
        ];
        return home.with({
          wires: home.doc.wires.map((wire) => ({ ...wire, from: cross(wire.from), to: cross(wire.to) })),
        });
      }),
  },
  {
    rule: 'switched-earth',
    mistake: 'a switch in the earth of a load',
    make: (home) =>
      points(home)
        .filter(isEarthed)
        .flatMap((load) =>
          home
            .wiresAt(load.id, 'E')
            .filter(({ to }) => to[0] === load.id)
            .map((wire) => home.insert(wire, control(load.place))),
        ),
  },
  {
    rule: 'missing-earth',
    mistake: 'an earth core not landed',
    make: (home) =>
      points(home)
        .filter(isEarthed)
        .flatMap((load) =>
          home
            .wiresAt(load.id, 'E')
            .filter(({ to }) => to[0] === load.id)
            .map((wire) => home.cut(wire)),
        ),
  },
  {
    rule: 'no-main-earth',
    mistake: 'the main earth not joined to its source',
    make: (home) =>
      [...home.parts('electrode'), ...(home.doc.supply.system === 'TT' ? [] : home.parts('supply'))].flatMap(({ id }) =>
        home.wiresAt(id, 'E').map((wire) => home.cut(wire)),
      ),
    also: ['no-earth-reference-on-backup'],
  },
  {
    rule: 'earth-neutral-joined',
    mistake: 'a neutral bar joined to the earth bar',
    make: (home) =>
      home
        .parts('neutral-bar')
        .map(({ id }) => home.join('neutral', home.freeOn(id), home.freeOn(home.parts('earth-bar')[0]!.id))),
  },
  {
    rule: 'open-neutral',
    mistake: 'a neutral core not landed',
    make: (home) =>
      loads(home).flatMap((load) =>
        home
          .wiresAt(load.id, 'N')
          .filter(({ to }) => to[0] === load.id)
          .map((wire) => home.cut(wire)),
      ),
  },
  {
    rule: 'open-line',
    mistake: 'a line core not landed',
    make: (home) =>
      loads(home).flatMap((load) =>
        home
          .wiresAt(load.id, 'L')
          .filter(({ to }) => to[0] === load.id)
          .map((wire) => home.cut(wire)),
      ),
  },
  {
    rule: 'open-line',
    mistake: "the service's line core on the neutral of the supply",
    make: (home) => moveAtSupply(home, 'L', 'N'),
  },
  {
    rule: 'open-line',
    mistake: "the service's line core on the earth of the supply",
    make: (home) => moveAtSupply(home, 'L', 'E'),
  },
  {
    rule: 'open-neutral',
    mistake: "the service's neutral core on the line of the supply",
    make: (home) => moveAtSupply(home, 'N', 'L'),
  },
  {
    rule: 'open-line',
    mistake: 'the line of a way begun on a neutral bar',
    make: (home) =>
      home.waysWith('lamp').flatMap(({ device }) =>
        home.wiresAt(device.id, '1').map((wire) => {
          const end: End = home.freeOn(home.parts('neutral-bar')[0]!.id);
          return home.setWire(wire, wire.to[0] === device.id ? { from: end } : { to: end });
        }),
      ),
  },
  {
    rule: 'short-circuit',
    mistake: 'the main earth core on the line of the supply',
    make: (home) => moveAtSupply(home, 'E', 'L'),
  },
  {
    rule: 'short-circuit',
    mistake: 'line joined to neutral at an outlet',
    make: (home) => home.parts('socket').map(({ id }) => home.join('line', [id, 'L'], [id, 'N'])),
  },
  {
    rule: 'bypassed-contact',
    mistake: 'both terminals of a switch joined',
    make: (home) => switched(home).map(({ control: { id } }) => home.join('line', [id, '1'], [id, '2'])),
    also: ['permanent-feed'],
  },
  {
    rule: 'permanent-feed',
    mistake: 'a lamp joined to the line before its switch',
    make: (home) => switched(home).map(({ line, control: { id } }) => home.setWire(line, { from: [id, '1'] })),
    also: ['open-terminal', 'line-role-mismatch'],
  },
  {
    rule: 'two-way-miswired',
    mistake: 'common and strapper exchanged at a two-way switch',
    make: (home) =>
      home.parts('switch-2way').map(({ id }) => {
        const cross = ([part, mark]: [string, string]): [string, string] => [
          part,
          part === id ? ({ C: '1', 1: 'C' }[mark] ?? mark) : mark,
        ];
        return home.with({
          wires: home.doc.wires.map((wire) => ({ ...wire, from: cross(wire.from), to: cross(wire.to) })),
        });
      }),
  },
  {
    rule: 'line-role-mismatch',
    mistake: 'a neutral drawn as line',
    make: (home) =>
      home.doc.wires
        .filter(({ role, to }) => role === 'neutral' && home.part(to[0]).kind === 'lamp')
        .map((wire) =>
          home.with({
            wires: home.doc.wires.map((one) =>
              one.id === wire.id ? { ...wire, role: 'line', colour: undefined } : one,
            ),
          }),
        ),
  },
  {
    rule: 'open-terminal',
    mistake: 'a surge arrester without its neutral',
    make: (home) => home.parts('spd').flatMap(({ id }) => home.wiresAt(id, 'N').map((wire) => home.cut(wire))),
  },
  {
    rule: 'crowded-terminal',
    mistake: 'two rows of outlets led on from one outlet',
    make: (home) =>
      home.parts('socket').flatMap((socket) => {
        const onward = home.wiresAt(socket.id, 'L').find(({ from }) => from[0] === socket.id);
        const next = onward && home.far(onward, socket.id)[0];
        if (!next || home.part(next).kind !== 'socket') return [];
        const after = (['L', 'N', 'E'] as const).map((mark) =>
          home.wiresAt(next, mark).find(({ from }) => from[0] === next),
        );
        if (after.some((wire) => !wire) || home.wiresAt(socket.id, 'L').length < 2) return [];
        return [
          home.with({
            wires: home.doc.wires.map((wire) =>
              after.includes(wire) ? { ...wire, from: [socket.id, wire.from[1]] } : wire,
            ),
          }),
        ];
      }),
  },
];
