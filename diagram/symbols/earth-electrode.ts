import type { SymbolFamily } from './family';

export const earthElectrode: SymbolFamily = {
  id: 'electrode',
  name: 'earth electrode',
  standard: 'IEC 60617, earth, general symbol (from memory)',
  kinds: ['electrode'],
  overview: {
    width: 500,
    height: 500,
    strokes: [{ d: 'M250 0V250M0 250H500M94 375H406M188 500H312' }],
    terminals: { E: { x: 250, y: 0, side: 'up' } },
  },
  connections: {
    width: 1500,
    height: 1250,
    strokes: [{ d: 'M750 0V500M125 500H1375M344 781H1156M562 1062H938' }],
    terminals: { E: { x: 750, y: 0, side: 'up' } },
  },
};
