import type { Part } from '../document/schema';
import type { Graph } from '../terminals/graph';

/** A position in which a part can be put by hand: "closed", "open", "A", "straight", "in" ... */
export type Setting = string;

const CLOSED_OPEN = ['closed', 'open'] as const;

/** The positions of a part, the working one first; empty for what cannot be operated. */
export function settingsOf(part: Part): readonly Setting[] {
  switch (part.kind) {
    case 'fuse':
    case 'isolator':
    case 'mcb':
    case 'rcd':
    case 'rcbo':
    case 'switch':
    case 'switch-2pole':
    case 'regulator':
      return CLOSED_OPEN;
    case 'socket':
      return part.switched ? CLOSED_OPEN : [];
    case 'changeover':
      return ['A', '0', 'B'];
    case 'switch-2way':
      return ['1', '2'];
    case 'switch-cross':
      return ['straight', 'crossed'];
    case 'plug':
      return part.in === undefined ? [] : ['in', 'out'];
    case 'inverter':
      return ['on', 'off'];
    default:
      return [];
  }
}

/** The position after this one, round and round. */
export function nextSetting(part: Part, now: Setting): Setting {
  const all = settingsOf(part);
  return all[(all.indexOf(now) + 1) % all.length] ?? now;
}

/** True where no current passes: open, pulled, off, in the middle. */
export const isOpenSetting = (setting: Setting | undefined): boolean =>
  setting === 'open' || setting === 'out' || setting === 'off' || setting === '0';

const WORDS: Readonly<Record<string, string>> = {
  in: 'in its outlet',
  out: 'pulled',
  A: 'at A',
  '0': 'at 0',
  B: 'at B',
  '1': 'at 1',
  '2': 'at 2',
};

/** A position as one says it: "open", "off", "pulled", "at B". */
export function settingWord(part: Part, setting: Setting): string {
  const lever =
    part.kind === 'switch' || part.kind === 'switch-2pole' || part.kind === 'regulator' || part.kind === 'socket';
  if (lever) return setting === 'open' ? 'off' : 'on';
  if (part.kind === 'fuse') return setting === 'open' ? 'drawn out' : 'in place';
  return WORDS[setting] ?? setting;
}

/** What a hand does to bring a part into a position: "open Q4", "pull X9". */
export function settingVerb(part: Part, setting: Setting): string {
  switch (setting) {
    case 'open':
      return part.kind === 'fuse' ? 'draw out' : settingWord(part, setting) === 'off' ? 'switch off' : 'open';
    case 'closed':
      return part.kind === 'fuse' ? 'put back' : settingWord(part, setting) === 'on' ? 'switch on' : 'close';
    case 'out':
      return 'pull';
    case 'in':
      return 'plug in';
    case 'off':
      return 'switch off';
    case 'on':
      return 'switch on';
    default:
      return 'turn';
  }
}

/** Where each part that can be operated stands, by id. */
export type Settings = Readonly<Record<string, Setting>>;

/** The positions that are drawn; the working one where the drawing says nothing. */
export function drawnSettings(graph: Graph): Record<string, Setting> {
  const settings: Record<string, Setting> = {};
  for (const part of graph.parts.values()) {
    const all = settingsOf(part);
    const drawn = 'state' in part ? part.state : undefined;
    if (all.length > 0) settings[part.id] = drawn !== undefined && all.includes(drawn) ? drawn : all[0]!;
  }
  return settings;
}
