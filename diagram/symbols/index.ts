import { isBar, polesOf } from '../document/kinds';
import type { Face, Kind, Part, Position } from '../document/schema';
import { appliance } from './appliance';
import { barLength, barSymbol, barTerminal, type BarKind } from './bar';
import { battery } from './battery';
import { bond } from './bond';
import { changeover } from './changeover';
import { circuitBreaker } from './circuit-breaker';
import { crossSwitch } from './cross-switch';
import { earthElectrode } from './earth-electrode';
import type { Shape, SymbolFamily } from './family';
import { fan } from './fan';
import { fuse } from './fuse';
import { inverter } from './inverter';
import { lamp } from './lamp';
import { meter } from './meter';
import { oneWaySwitch } from './one-way-switch';
import { outlet } from './outlet';
import { plug } from './plug';
import { rcbo } from './rcbo';
import { regulator } from './regulator';
import { residualCurrentDevice } from './residual-current-device';
import { supplyArrow } from './supply-arrow';
import { surgeArrester } from './surge-arrester';
import { switchDisconnector } from './switch-disconnector';
import { turnedTerminal } from './turn';
import { twoPoleSwitch } from './two-pole-switch';
import { twoWaySwitch } from './two-way-switch';
import type { SymbolData, TerminalPlace } from './types';
import { unknownSymbol } from './unknown';

/** The registry of symbols, in the order of the legend. */
const FAMILIES: readonly SymbolFamily[] = [
  supplyArrow,
  fuse,
  meter,
  switchDisconnector,
  circuitBreaker,
  residualCurrentDevice,
  rcbo,
  surgeArrester,
  changeover,
  inverter,
  battery,
  earthElectrode,
  bond,
  oneWaySwitch,
  twoWaySwitch,
  crossSwitch,
  twoPoleSwitch,
  regulator,
  outlet,
  plug,
  lamp,
  fan,
  appliance,
];
const BARS: readonly BarKind[] = ['line-bar', 'neutral-bar', 'earth-bar', 'joint'];

const isBarKind = (kind: string): kind is BarKind => (BARS as readonly string[]).includes(kind);

const named = (family: SymbolFamily, id: string, shape: Shape): SymbolData => ({
  id,
  name: family.name,
  standard: family.standard,
  kinds: family.kinds,
  width: shape.width,
  height: shape.height,
  strokes: shape.strokes,
  ...(shape.texts && { texts: shape.texts }),
  terminals: shape.terminals,
});

const byName = new Map<string, SymbolData>([[unknownSymbol.id, unknownSymbol]]);
const familyOf = new Map<string, SymbolFamily>();
for (const family of FAMILIES) {
  for (const kind of family.kinds) familyOf.set(kind, family);
  byName.set(family.id, named(family, family.id, family.overview));
  if ('one' in family.connections) {
    byName.set(`${family.id}.box1`, named(family, `${family.id}.box1`, family.connections.one));
    byName.set(`${family.id}.box2`, named(family, `${family.id}.box2`, family.connections.two));
  } else byName.set(`${family.id}.box`, named(family, `${family.id}.box`, family.connections));
}

/** Terminals a bar or joint is drawn with where the drawing does not say how many it has. */
const DEFAULT_COUNT = 2;
/** 1/100 mm, a bar on the overview before anything hangs from it. */
export const SHORT_BAR = 4000;

/**
 * The picture of a part on a face. A bar is drawn with `count` terminals on the connections face; on the overview its
 * length follows from what hangs on it, so the scene gives it.
 */
export function symbolFor(part: Pick<Part, 'kind'> & Partial<Part>, face: Face, count = DEFAULT_COUNT): SymbolData {
  if (isBarKind(part.kind))
    return barSymbol(
      part.kind,
      face,
      face === 'overview' ? SHORT_BAR : barLength(part.kind, Math.max(count, DEFAULT_COUNT)),
    );
  const family = familyOf.get(part.kind);
  if (!family) return unknownSymbol;
  if (face === 'overview') return byName.get(family.id)!;
  if (!('one' in family.connections)) return byName.get(`${family.id}.box`)!;
  return byName.get(`${family.id}.box${polesOf(part as Part)}`)!;
}

/** A symbol by the id a scene names; a bar is drawn as long as the scene part is wide. Never fails: the crossed box stands in. */
export function symbolById(id: string, width = 0): SymbolData {
  const [kind = '', ...variants] = id.split('.');
  if (isBarKind(kind))
    return barSymbol(kind, variants.includes('box') ? 'connections' : 'overview', width, variants.includes('cased'));
  return byName.get(id) ?? unknownSymbol;
}

/**
 * Where a terminal of a part lies on a face, absolute, or null when the part has none of that mark. On the overview a
 * bar's terminals stand where its conductors are, so the scene is asked for those.
 */
export function terminalAt(part: Part, mark: string, position: Position, face: Face): TerminalPlace | null {
  const symbol = symbolFor(part, face);
  const place =
    isBar(part.kind) && isBarKind(part.kind) && face === 'connections'
      ? barTerminal(part.kind, Number(mark) - 1)
      : symbol.terminals[mark];
  if (!place) return null;
  const turned = turnedTerminal(place, symbol, position.turn ?? 0);
  return { x: position.x + turned.x, y: position.y + turned.y, side: turned.side };
}

/** Every symbol of the overview once, in the order of the legend; only those of `kinds` where given. */
export function legend(kinds?: ReadonlySet<Kind>): SymbolData[] {
  const symbols = [
    ...FAMILIES.map((family) => byName.get(family.id)!),
    ...BARS.map((kind) => barSymbol(kind, 'overview', 1500)),
  ];
  return kinds ? symbols.filter((symbol) => symbol.kinds.some((kind) => kinds.has(kind))) : symbols;
}
