import type { Installation, Part } from '../document/schema';
import type { Isolation } from './isolation';
import { settingVerb } from './settings';
import type { LiveBeside, LiveTerminal, StillLive } from './still-live';
import { capital, count, partName, partNames, voltText } from './words';

/** What is told about opening a part and about making it dead, in sentences. */

type Home = Pick<Installation, 'places' | 'parts'>;

/** Names in a home; ids that are no longer there are left out. */
function namesIn(home: Home) {
  const parts = new Map(home.parts.map((part) => [part.id, part]));
  const known = (ids: readonly string[]) => ids.flatMap((id) => parts.get(id) ?? []);
  return {
    part: (id: string) => parts.get(id),
    one: (id: string) => (parts.has(id) ? partName(home, parts.get(id)!) : id),
    all: (ids: readonly string[]) => partNames(home, known(ids)),
    place: (id: string) => home.places.find((place) => place.id === id)?.name ?? id,
  };
}

/** One sentence of a list; what must not be overlooked is marked. */
export interface Said {
  text: string;
  grave: boolean;
}

const plain = (text: string): Said => ({ text, grave: false });
const grave = (text: string): Said => ({ text, grave: true });

function terminalText(home: Home, terminal: LiveTerminal, own: Part): Said {
  const { one, all } = namesIn(home);
  const mark = terminal.mark === '' ? 'It' : `Terminal ${terminal.mark}`;
  const volts = voltText(terminal.volts);
  if (terminal.from === null) return grave(`${mark} stands at ${volts} through a load.`);
  const from = terminal.from === own.id ? 'its own battery' : one(terminal.from);
  const through = terminal.through.length > 0 ? ` through ${all(terminal.through.slice(-2))}` : '';
  return plain(`${mark} stays live: ${volts} from ${from}${through}.`);
}

/** Beyond so many places each is named with its ways alone. */
const IN_FULL = 3;

/** What lives on in the places that have parts gone dark: there somebody would put a hand. */
function besideSaid(home: Home, beside: readonly LiveBeside[]): Said[] {
  const names = namesIn(home);
  if (beside.length > IN_FULL) {
    const places = beside.map(({ place, ways }) =>
      ways.length > 0 ? `${names.place(place)} (${names.all(ways)})` : names.place(place),
    );
    return [grave(`In ${beside.length} places something stays live: ${places.join('; ')}.`)];
  }
  return beside.map(({ place, parts, from, ways }) => {
    const through = ways.length > 0 ? ` through ${names.all(ways)}` : '';
    const source = from.length > 0 ? ` from ${names.all(from)}${through}` : ' through a load';
    return grave(
      `In ${names.place(place)} ${names.all(parts)} ${parts.length === 1 ? 'stays' : 'stay'} live${source}.`,
    );
  });
}

/** What stays live and what goes dark when a part is opened. */
export function sayStillLive(home: Home, still: StillLive): Said[] {
  const names = namesIn(home);
  const part = names.part(still.part);
  if (!part) return [];
  const said: Said[] = [];
  if (still.dark.length > 0) said.push(plain(`Dark: ${names.all(still.dark)}.`));
  else if (still.setting !== null && !still.already) said.push(plain('Nothing goes dark by it.'));
  for (const terminal of still.own) said.push(terminalText(home, terminal, part));
  if (still.own.length === 0)
    said.push(plain(still.setting === null ? 'Nothing in it is live now.' : 'None of its terminals is live then.'));
  if (part.kind === 'inverter')
    said.push(grave('The leads to its battery stay live up to the device that parts them.'));
  if (still.takesOver.length > 0) said.push(grave(`${names.all(still.takesOver)} takes over from the battery.`));
  said.push(...besideSaid(home, still.beside));
  if (still.liveNeutrals.length > 0)
    said.push(
      grave(
        `${capital(count(still.liveNeutrals.length, 'neutral core becomes', 'neutral cores become'))} live through the loads that are on.`,
      ),
    );
  if (still.floating.length > 0)
    said.push(grave(`The neutral of ${names.all(still.floating)} has no earth then: a first fault trips nothing.`));
  if (still.neutralJoined && still.setting !== null)
    said.push(plain('It parts the line only: the neutral stays joined.'));
  return said;
}

/** How a part is made dead: the steps in their order, then what to mind. */
export interface IsolationTold {
  steps: string[];
  cautions: Said[];
}

/** The order of EN 50110-1, from memory: disconnect, secure against closing, prove dead. */
export function sayIsolation(home: Home, isolation: Isolation): IsolationTold {
  const names = namesIn(home);
  const part = names.part(isolation.part);
  const battery = grave('Battery terminals are never dead.');
  if (!part) return { steps: [], cautions: [] };
  const own = names.one(part.id);
  if (isolation.never)
    return {
      steps: [],
      cautions: [
        grave(`Nothing makes ${own} dead.`),
        plain('Cover its terminals; take off rings and chains; use insulated tools.'),
      ],
    };
  if (isolation.open === null)
    return {
      steps: [],
      cautions: [
        grave(`Nothing in this home makes ${own} dead: ${names.all(isolation.sources)} reaches it past every device.`),
        plain(
          isolation.sources.some((id) => names.part(id)?.kind === 'supply')
            ? 'Only the supplier can part it from the network.'
            : 'Cover its live side; take off rings and chains; use insulated tools.',
        ),
      ],
    };
  if (isolation.open.length === 0)
    return { steps: [`No source reaches ${own}: prove it dead all the same.`], cautions: [] };
  const steps = isolation.open.map(
    ({ part: id, setting }) => `${capital(settingVerb(names.part(id)!, setting))} ${names.one(id)}.`,
  );
  const locks = isolation.open.map(({ part: id }) => names.part(id)!);
  const pulled = locks.filter(({ kind }) => kind === 'plug' || kind === 'fuse');
  const locked = locks.filter(({ kind }) => kind !== 'plug' && kind !== 'fuse');
  if (locked.length > 0) steps.push(`Lock ${partNames(home, locked)} off; hang the notice.`);
  if (pulled.length > 0) steps.push(`Keep ${partNames(home, pulled)} with you.`);
  steps.push(`Prove the tester, prove ${own} dead, L to N, L to PE, N to PE, prove the tester again.`);
  const cautions: Said[] = [];
  if (isolation.sources.length > 1)
    cautions.push(
      grave(`${capital(count(isolation.sources.length, 'source'))} can feed it: ${names.all(isolation.sources)}.`),
    );
  if (isolation.neutralJoined) cautions.push(grave('The neutral stays joined: part no neutral that others may share.'));
  if (isolation.alsoDark.length > 0) cautions.push(plain(`Dark as well: ${names.all(isolation.alsoDark)}.`));
  if (home.parts.some(({ kind }) => kind === 'battery')) cautions.push(battery);
  return { steps, cautions };
}
