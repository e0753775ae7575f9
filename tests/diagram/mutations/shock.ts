import type { Home, Mutation } from './edit';

/** Rcds behind which an outlet of the mains hangs. */
const guarding = (home: Home, backup: boolean) =>
  home.waysWith('socket', backup).flatMap(({ device }) => {
    const bar = home.wiresAt(device.id, '1').map((wire) => home.far(wire, device.id)[0])[0]!;
    const feeder = home.wiresAt(bar).find(({ to }) => to[0] === bar);
    const rcd = feeder && home.part(feeder.from[0]);
    return rcd?.kind === 'rcd' ? [{ rcd, bar }] : [];
  });

export const SHOCK: readonly Mutation[] = [
  {
    rule: 'no-rcd',
    mistake: 'an rcd of 300 mA before outlets',
    make: (home) => guarding(home, false).map(({ rcd }) => home.set(rcd, { sensitivity: 0.3 })),
  },
  {
    rule: 'rcd-idle-on-backup',
    mistake: "the inverter fed from behind the mains' rcd, and none at its output",
    make: (home) => {
      const feed = home.ways.find(
        ({ device, parts }) => !parts.some((id) => id !== device) || home.part(device).label === 'Inverter feed',
      );
      const mains = guarding(home, false)[0];
      const backup = guarding(home, true)[0];
      if (!feed || !mains || !backup) return [];
      const neutralBar = home.wiresAt(mains.rcd.id, '4').map((wire) => home.far(wire, mains.rcd.id)[0])[0]!;
      const moved = (id: string, mark: string, bar: string) => (drawn: Home) =>
        drawn.setWire(drawn.wiresAt(id, mark)[0]!, { from: drawn.freeOn(bar) });
      const { id, place, board, ref, rating } = backup.rcd;
      const plain = {
        id,
        kind: 'isolator' as const,
        poles: 2 as const,
        rating: rating!,
        ...(place && { place }),
        ...(board && { board }),
        ...(ref && { ref }),
      };
      const swapped = home.with({ parts: home.doc.parts.map((part) => (part.id === id ? plain : part)) });
      return [
        [moved(feed.device, '1', mains.bar), moved(feed.device, '3', neutralBar)].reduce(
          (drawn, move) => move(drawn),
          swapped,
        ),
      ];
    },
    also: ['slow-disconnection'],
  },
  {
    rule: 'no-earth-reference-on-backup',
    mistake: 'an inverter without its bond',
    make: (home) => home.parts('inverter').map((inverter) => home.set(inverter, { bond: false })),
  },
  {
    rule: 'slow-disconnection',
    mistake: 'a supply whose loop is far above what was declared',
    make: (home) =>
      home.doc.supply.system !== 'TT' && home.parts('inverter').length > 0
        ? [home.with({ supply: { ...home.doc.supply, ze: 8 } })]
        : [],
  },
  {
    rule: 'thin-earth',
    mistake: 'an earth core of 0.25 mm2 to the inverter, which no rcd guards',
    make: (home) =>
      home.doc.supply.system === 'TT'
        ? []
        : home
            .parts('inverter')
            .flatMap(({ id }) =>
              home
                .wiresAt(id, 'in.E')
                .flatMap(({ cable }) => (cable === undefined ? [] : [home.setCable(cable, { cpc: 0.25 })])),
            ),
  },
  {
    rule: 'no-main-bond',
    mistake: 'the water pipe not bonded',
    make: (home) => home.parts('bond').flatMap(({ id }) => home.wiresAt(id).map((wire) => home.cut(wire))),
    also: ['open-terminal'],
  },
  {
    rule: 'wet-place-socket',
    mistake: 'an outlet in the bath',
    make: (home) =>
      home.doc.places
        .filter(({ kind }) => kind === 'wet')
        .flatMap((wet) =>
          home
            .parts('socket')
            .filter(({ place }) => place?.startsWith(wet.id))
            .map((socket) => home.set(socket, { place: wet.id })),
        ),
  },
];
