import type { Installation } from '../document/schema';
import type { Rehearsed } from './rehearse';
import type { ConditionName } from './stance';
import { settingWord } from './settings';
import { capital, partName, partNames } from './words';

export const CONDITION_WORDS: Readonly<Record<ConditionName, string>> = {
  mains: 'mains',
  outage: 'outage',
  'main-off': 'main off',
  isolated: 'isolated',
};

/** What each condition means, said where it is chosen. */
export const CONDITION_MEANS: Readonly<Record<ConditionName, string>> = {
  mains: 'The supply is there; inverters pass it through and charge.',
  outage: 'The supply is gone; inverters run from their batteries. Its neutral and earth are still joined.',
  'main-off': 'Somebody has opened the main switch; inverters run from their batteries behind it.',
  isolated: 'The main switch is open and every battery parted from its inverter.',
};

const idsWhere = (rehearsed: Rehearsed, test: (id: string) => boolean): string[] =>
  Object.keys(rehearsed.figures.parts).filter(test);

/** What changed between two answers, in one or two sentences for a live region and the foot of the sheet. */
export function sayChange(
  home: Pick<Installation, 'parts' | 'places' | 'supply'>,
  before: Rehearsed,
  now: Rehearsed,
): string {
  const parts = new Map(home.parts.map((part) => [part.id, part]));
  const all = (ids: readonly string[]) =>
    partNames(
      home,
      ids.flatMap((id) => parts.get(id) ?? []),
    );
  const half = home.supply.voltage / 2;
  const fed = (rehearsed: Rehearsed, id: string) => (rehearsed.figures.parts[id]?.load?.volts ?? 0) > half;
  const said: string[] = [];
  if (before.condition !== now.condition) said.push(`${capital(CONDITION_WORDS[now.condition])}.`);
  const turned = Object.entries(now.settings).filter(
    ([id, setting]) => before.settings[id] !== setting && parts.has(id),
  );
  for (const [id, setting] of turned.slice(0, 3))
    said.push(`${partName(home, parts.get(id)!)} ${settingWord(parts.get(id)!, setting)}.`);
  if (turned.length > 3) said.push(`${turned.length - 3} more turned.`);
  const dark = idsWhere(now, (id) => fed(before, id) && !fed(now, id));
  const lit = idsWhere(now, (id) => !fed(before, id) && fed(now, id));
  if (dark.length > 0) said.push(`Dark: ${all(dark)}.`);
  if (lit.length > 0) said.push(`Fed again: ${all(lit)}.`);
  const over = now.onBattery.filter((id) => !before.onBattery.includes(id));
  const back = before.onBattery.filter((id) => !now.onBattery.includes(id));
  if (over.length > 0) said.push(`${all(over)} on battery.`);
  if (back.length > 0) said.push(`${all(back)} no longer on battery.`);
  const trips = now.unheld.filter(({ part }) => !before.unheld.some((each) => each.part === part));
  if (trips.length > 0) said.push(`${all(trips.map(({ part }) => part))} will not stay closed.`);
  if (said.length > 0 && dark.length === 0 && lit.length === 0 && turned.length > 0) said.push('No load changes.');
  return said.join(' ');
}
