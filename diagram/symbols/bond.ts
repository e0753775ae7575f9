import type { SymbolFamily } from './family';

/** A bond to a water, gas or other extraneous part. */
export const bond: SymbolFamily = {
  id: 'bond',
  name: 'bond to a pipe or frame',
  standard: 'IEC 60617, protective equipotential bonding (from memory)',
  kinds: ['bond'],
  overview: {
    width: 500,
    height: 500,
    strokes: [{ d: 'M250 0V125' }, { d: 'M31 125H469L250 500Z', fill: 'paper' }],
    terminals: { E: { x: 250, y: 0, side: 'up' } },
  },
  connections: {
    width: 1500,
    height: 1250,
    strokes: [{ d: 'M750 0V375' }, { d: 'M219 375H1281L750 1219Z', fill: 'paper' }],
    terminals: { E: { x: 750, y: 0, side: 'up' } },
  },
};
