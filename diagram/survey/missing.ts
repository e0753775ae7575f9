import type { SurveyRoom } from '../document/schema';
import type { Drawn } from './drawn';

/** How a row and its room on the drawing differ. Counts are 0 or more. */
export interface Difference {
  /** in the survey, not drawn */
  lamps: number;
  fans: number;
  outlets: number;
  heavy: { what: string; watts: number }[];
  /** of the lamps and fans not drawn, those that are to stay on */
  keptLamps: number;
  keptFans: number;
  keptOutlet: boolean;
  /** drawn on the mains, to stay on by the survey; and the other way round */
  lampsToBackup: number;
  fansToBackup: number;
  lampsToMains: number;
  fansToMains: number;
  /** drawn, not in the survey, in words: "1 lamp", "oven" */
  extra: string[];
  /** drawn with other watts: "lamps of 12 W" */
  watts: string[];
}

const more = (a: number, b: number): number => Math.max(0, a - b);
const counted = (n: number, what: string): string => `${n} ${what}${n === 1 ? '' : 's'}`;
const countedAll = (counts: readonly (readonly [number, string])[]): string[] =>
  counts.flatMap(([n, what]) => (n > 0 ? [counted(n, what)] : []));
const sameName = (a: string | undefined, b: string): boolean =>
  (a ?? '').trim().toLowerCase() === b.trim().toLowerCase();

/** Appliances of the survey without one drawn of the same name, and the other way round. */
function heavyDifference(
  room: SurveyRoom,
  drawn: Drawn,
): { missing: Difference['heavy']; extra: string[]; watts: string[] } {
  const left = [...drawn.heavy];
  const missing: Difference['heavy'] = [];
  const watts: string[] = [];
  for (const item of room.heavy) {
    const exact = left.findIndex((part) => sameName(part.label, item.what) && part.watts === item.watts);
    const found = exact >= 0 ? exact : left.findIndex((part) => sameName(part.label, item.what));
    if (found < 0) missing.push(item);
    else {
      const [part] = left.splice(found, 1);
      if (part!.watts !== undefined && part!.watts !== item.watts) watts.push(`${item.what} of ${part!.watts} W`);
    }
  }
  return { missing, extra: left.map((part) => part.label ?? 'appliance'), watts };
}

/** Other watts than the survey's, among lamps or fans. */
function otherWatts(parts: readonly { watts?: number }[], surveyed: number, what: string): string[] {
  const other = parts.map(({ watts }) => watts).filter((watts) => watts !== undefined && watts !== surveyed);
  return other.length > 0 ? [`${what} of ${[...new Set(other)].join(', ')} W`] : [];
}

/** Compares a row with what is drawn in its room. */
export function differenceOf(room: SurveyRoom, drawn: Drawn): Difference {
  const lamps = more(room.lamps, drawn.lamps.length);
  const fans = more(room.fans, drawn.fans.length);
  const keptLamps = Math.min(lamps, more(room.keepLamps, drawn.keptLamps.length));
  const keptFans = Math.min(fans, more(room.keepFans, drawn.keptFans.length));
  const heavy = heavyDifference(room, drawn);
  const keptOutlets = room.keepOutletWatts > 0 ? 1 : 0;
  const extras: [number, string][] = [
    [more(drawn.lamps.length, room.lamps), 'lamp'],
    [more(drawn.fans.length, room.fans), 'fan'],
    [more(drawn.outlets.length, room.outlets), 'outlet'],
    [more(drawn.keptOutlets.length, keptOutlets), 'backup outlet'],
  ];
  const kept = drawn.keptOutlets
    .map((part) => part.load)
    .find((load) => load !== undefined && keptOutlets > 0 && load !== room.keepOutletWatts);
  return {
    lamps,
    fans,
    outlets: more(room.outlets, drawn.outlets.length),
    heavy: heavy.missing,
    keptLamps,
    keptFans,
    keptOutlet: keptOutlets > drawn.keptOutlets.length,
    lampsToBackup: more(room.keepLamps, drawn.keptLamps.length + keptLamps),
    fansToBackup: more(room.keepFans, drawn.keptFans.length + keptFans),
    lampsToMains: more(drawn.keptLamps.length, room.keepLamps),
    fansToMains: more(drawn.keptFans.length, room.keepFans),
    extra: [...countedAll(extras), ...heavy.extra],
    watts: [
      ...otherWatts(drawn.lamps, room.lampWatts, 'lamps'),
      ...otherWatts(drawn.fans, room.fanWatts, 'fans'),
      ...heavy.watts,
      ...(kept === undefined ? [] : [`backup outlet of ${kept} W`]),
    ],
  };
}

/** What a draft would draw, in words: "+1 outlet", "+oven", "1 lamp to backup". */
export function draftWords(difference: Difference): string[] {
  const missing = countedAll([
    [difference.lamps, 'lamp'],
    [difference.fans, 'fan'],
    [difference.outlets, 'outlet'],
    [difference.keptOutlet ? 1 : 0, 'backup outlet'],
  ]);
  const toBackup = countedAll([
    [difference.lampsToBackup, 'lamp'],
    [difference.fansToBackup, 'fan'],
  ]);
  const toMains = countedAll([
    [difference.lampsToMains, 'lamp'],
    [difference.fansToMains, 'fan'],
  ]);
  return [
    ...[...missing, ...difference.heavy.map(({ what }) => what)].map((words) => `+${words}`),
    ...toBackup.map((words) => `${words} to backup`),
    ...toMains.map((words) => `${words} to mains`),
  ];
}
