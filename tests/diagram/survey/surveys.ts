import fc from 'fast-check';
import type { EarthingSystemSchema, Supply, SurveyRoom } from '@/diagram/document/schema';
import { emptyRoom } from '@/diagram/survey/columns';
import type { DraftOptions } from '@/diagram/survey/draft';
import type { z } from 'zod';

/** Surveys for tests: one that is told in the studies of the screens, and every one that can be typed. */

type System = z.infer<typeof EarthingSystemSchema>;

/** Supply data as a distributor declares it: 0.35 ohm TN-C-S and 0.8 ohm TN-S (BS 7671 declared values, reference values part 4). */
export const supplyOf = (system: System): Supply => ({
  system,
  voltage: 230,
  frequency: 50,
  zln: 0.25,
  ...(system === 'TT' ? { ra: 20 } : { ze: system === 'TN-S' ? 0.8 : 0.35 }),
});

export const optionsOf = (
  practice: DraftOptions['practice'] = 'IEC',
  system: System = 'TT',
  hoursWanted = 4,
): DraftOptions => ({
  title: 'A home',
  practice,
  supply: supplyOf(system),
  hoursWanted,
});

export const room = (name: string, fields: Partial<SurveyRoom> = {}): SurveyRoom => ({
  ...emptyRoom(name.toLowerCase().replaceAll(' ', '-'), 0),
  name,
  ...fields,
});

/** Six rooms that use every column. */
export const sixRooms = (): SurveyRoom[] =>
  [
    room('Hall', { kind: 'passage', lamps: 2, keepLamps: 1, hours: 3 }),
    room('Front room', { lamps: 3, fans: 1, outlets: 3, keepLamps: 1, keepFans: 1, hours: 3 }),
    room('Kitchen', {
      lamps: 2,
      lampWatts: 12,
      outlets: 3,
      heavy: [{ what: 'oven', watts: 3000 }],
      keepLamps: 1,
      hours: 3,
    }),
    room('Bath', {
      kind: 'wet',
      lamps: 2,
      lampWatts: 7,
      outlets: 1,
      heavy: [{ what: 'heater', watts: 2000 }],
      keepLamps: 1,
      hours: 2,
    }),
    room('Study', { lamps: 2, fans: 1, outlets: 3, keepLamps: 1, keepFans: 1, keepOutletWatts: 60, hours: 4 }),
    room('Bedroom', { kind: 'sleeping', lamps: 2, fans: 1, outlets: 2, keepLamps: 1, keepFans: 1, hours: 4 }),
  ].map((row, order) => ({ ...row, order }));

const kinds = ['room', 'sleeping', 'wet', 'passage', 'outdoor', 'intake'] as const;

/** Mostly what homes hold, now and then the most that a cell takes. */
const often = (usual: number, most: number): fc.Arbitrary<number> =>
  fc.oneof(
    { weight: 8, arbitrary: fc.integer({ min: 0, max: usual }) },
    { weight: 1, arbitrary: fc.integer({ min: 0, max: most }) },
  );

const heavyItem = fc.record({
  what: fc.constantFrom('oven', 'heater', 'geyser', 'pump', 'air conditioner', 'shower', 'mill', 'hob'),
  watts: fc.oneof(
    { weight: 6, arbitrary: fc.integer({ min: 100, max: 3600 }) },
    { weight: 1, arbitrary: fc.integer({ min: 1, max: 20_000 }) },
  ),
});

const anyRoom = fc.record({
  kind: fc.constantFrom(...kinds),
  lamps: often(6, 60),
  lampWatts: fc.oneof(
    { weight: 8, arbitrary: fc.integer({ min: 1, max: 40 }) },
    { weight: 1, arbitrary: fc.integer({ min: 0, max: 2000 }) },
  ),
  fans: often(2, 20),
  fanWatts: fc.oneof(
    { weight: 8, arbitrary: fc.integer({ min: 20, max: 90 }) },
    { weight: 1, arbitrary: fc.integer({ min: 0, max: 1000 }) },
  ),
  outlets: often(6, 40),
  heavy: fc
    .array(heavyItem, { maxLength: 3 })
    .map((items) => items.map((item, i) => ({ ...item, what: `${item.what} ${i + 1}` }))),
  keep: fc.record({
    lamps: fc.double({ min: 0, max: 1.1, noNaN: true }),
    fans: fc.double({ min: 0, max: 1.1, noNaN: true }),
  }),
  keepOutletWatts: fc.oneof(
    { weight: 4, arbitrary: fc.constant(0) },
    { weight: 1, arbitrary: fc.integer({ min: 1, max: 300 }) },
    { weight: 1, arbitrary: fc.integer({ min: 1, max: 3000 }) },
  ),
  hours: often(8, 72),
  run: fc.option(
    fc.oneof(
      { weight: 6, arbitrary: fc.integer({ min: 2, max: 30 }) },
      { weight: 1, arbitrary: fc.integer({ min: 1, max: 200 }) },
    ),
    { nil: undefined },
  ),
});

/** 0 to 14 rooms; `backup` false keeps nothing on. Some rows have errors, as people type them. */
export const anySurvey = (backup: boolean): fc.Arbitrary<SurveyRoom[]> =>
  fc.array(anyRoom, { minLength: 0, maxLength: 14 }).map((rooms) =>
    rooms.map(({ keep, run, ...fields }, i) => ({
      ...room(`Room ${i + 1}`, fields),
      order: i,
      ...(run !== undefined && { run }),
      keepLamps: backup ? Math.min(60, Math.round(keep.lamps * fields.lamps)) : 0,
      keepFans: backup ? Math.min(20, Math.round(keep.fans * fields.fans)) : 0,
      keepOutletWatts: backup ? fields.keepOutletWatts : 0,
      hours: backup ? fields.hours : 0,
    })),
  );
