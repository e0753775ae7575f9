import type { Stroke, SymbolData } from '../symbols/types';
import { isOpenSetting, type Setting } from './settings';

/** Symbols are drawn at rest; a rehearsal shows how a contact stands: the blade in line, or apart. */

/** The blade of a make contact: from its hinge up to the left. */
const BLADE = /^M(\d+) (\d+)L(\d+) (\d+)$/;
/** What joins two ends straight: the conductor through a fuse or a switch drawn as a dot. */
const THROUGH = /^M(\d+) 0V(\d+)$/;
const CHANGEOVER = /M(\d+) (\d+)L(\d+) (\d+)$/;
/** 1/100 mm from hinge to fixed contact */
const TRAVEL = 500;

const isBlade = (stroke: Stroke): boolean => {
  const found = BLADE.exec(stroke.d);
  return found !== null && Number(found[1]) - Number(found[3]) === 310 && Number(found[2]) - Number(found[4]) === 531;
};

function devices(strokes: readonly Stroke[], open: boolean): Stroke[] {
  return strokes.map((stroke) => {
    if (open || !isBlade(stroke)) return stroke;
    const [, x, y] = BLADE.exec(stroke.d)!;
    return { ...stroke, d: `M${x} ${y}V${Number(y) - TRAVEL}` };
  });
}

/** A lever drawn as a dot has its conductor through it; open, the conductor ends short of the dot. */
function lever(strokes: readonly Stroke[], open: boolean): Stroke[] {
  return strokes.map((stroke) => {
    const found = THROUGH.exec(stroke.d);
    return open && found ? { ...stroke, d: `M${found[1]} 0V125M${found[1]} 500V${found[2]}` } : stroke;
  });
}

function fuse(strokes: readonly Stroke[], open: boolean): Stroke[] {
  return strokes.map((stroke) => {
    const found = /^M(\d+) (\d+)V(\d+)$/.exec(stroke.d);
    if (!open || !found) return stroke;
    const [x, top, bottom] = [Number(found[1]), Number(found[2]), Number(found[3])];
    return bottom - top === 1250
      ? { ...stroke, d: `M${x} ${top}V${top + 250}M${x} ${bottom - 250}V${bottom}` }
      : stroke;
  });
}

function changeover(strokes: readonly Stroke[], setting: Setting): Stroke[] {
  return strokes.map((stroke) => ({
    ...stroke,
    d: stroke.d.replace(CHANGEOVER, (whole, x: string, y: string, toX: string, toY: string) => {
      const side = Number(x) - Number(toX);
      const at = setting === 'A' ? Number(toX) : setting === 'B' ? Number(x) + side : Number(x);
      return side > 0 ? `M${x} ${y}L${at} ${toY}` : whole;
    }),
  }));
}

/** Of a two-way switch the lever that does not hold is thin and dashed. */
function twoWay(strokes: readonly Stroke[], setting: Setting): Stroke[] {
  return strokes.flatMap((stroke): Stroke[] => {
    const levers = /^(M250 500L469 125L594 200)(M250 500L31 875L156 950)$/.exec(stroke.d);
    if (levers) {
      const at = setting === '1' ? 0 : 1;
      return [levers[1]!, levers[2]!].map((d, i) => (i === at ? { d } : { d, weight: 'thin', dash: 'short' }));
    }
    const blade = /^M1250 812L560 1690$/.exec(stroke.d);
    return [blade && setting === '2' ? { ...stroke, d: 'M1250 812L1940 1690' } : stroke];
  });
}

function cross(strokes: readonly Stroke[], setting: Setting): Stroke[] {
  const swap = setting === 'crossed';
  return strokes.map((stroke) => {
    if (!swap) return stroke;
    if (stroke.d === 'M500 750V1750M2000 750V1750') return { ...stroke, weight: 'thin', dash: 'short' };
    return stroke.dash === 'short' ? { d: stroke.d } : stroke;
  });
}

/** The strokes of a symbol with its contact in a position; as drawn for what has none. */
export function strokesIn(symbol: SymbolData, setting: Setting | undefined): readonly Stroke[] {
  if (setting === undefined) return symbol.strokes;
  const open = isOpenSetting(setting);
  switch (symbol.kinds[0]) {
    case 'mcb':
    case 'isolator':
    case 'rcd':
    case 'rcbo':
      return devices(symbol.strokes, open);
    case 'switch':
    case 'switch-2pole':
      return symbol.id.includes('.box') ? devices(symbol.strokes, open) : lever(symbol.strokes, open);
    case 'fuse':
      return fuse(symbol.strokes, open);
    case 'changeover':
      return changeover(symbol.strokes, setting);
    case 'switch-2way':
      return twoWay(symbol.strokes, setting);
    case 'switch-cross':
      return cross(symbol.strokes, setting);
    default:
      return symbol.strokes;
  }
}
