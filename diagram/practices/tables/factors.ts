import type { Table } from '../types';

/** Correction factors of capacity, to the digit printed. */

const rows = (pairs: readonly (readonly [number, number])[], memory: boolean) =>
  pairs.map(([at, value]) => ({ at, value, memory }));

/** Air, PVC 70 degC: sqrt((70 - T) / 40) agrees to 0.006. */
export const IEC_AMBIENT_PVC: Table = {
  title: 'Table B.52.14, PVC',
  source: 'IEC 60364-5-52:2009 Table B.52.14',
  rows: rows(
    [
      [10, 1.22],
      [15, 1.17],
      [20, 1.12],
      [25, 1.06],
      [30, 1],
      [35, 0.94],
      [40, 0.87],
      [45, 0.79],
      [50, 0.71],
      [55, 0.61],
      [60, 0.5],
    ],
    true,
  ),
};

export const BS_AMBIENT_PVC: Table = {
  title: 'Table 4B1, 70 degC thermoplastic',
  source: 'BS 7671 Table 4B1, scan "Derating Factor Standard"',
  rows: rows(
    [
      [25, 1.03],
      [30, 1],
      [35, 0.94],
      [40, 0.87],
      [45, 0.79],
      [50, 0.71],
      [55, 0.61],
      [60, 0.5],
    ],
    false,
  ),
  note: 'at 25 degC the IEC table prints 1.06',
};

export const IEC_AMBIENT_XLPE: Table = {
  title: 'Table B.52.14, XLPE',
  source: 'IEC 60364-5-52:2009 Table B.52.14; sqrt((90 - T) / 60)',
  rows: rows(
    [
      [10, 1.15],
      [15, 1.12],
      [20, 1.08],
      [25, 1.04],
      [30, 1],
      [35, 0.96],
      [40, 0.91],
      [45, 0.87],
      [50, 0.82],
      [55, 0.76],
      [60, 0.71],
    ],
    true,
  ),
};

export const IEC_GROUND_PVC: Table = {
  title: 'Table B.52.15, PVC',
  source: 'IEC 60364-5-52:2009 Table B.52.15; sqrt((70 - T) / 50)',
  rows: rows(
    [
      [10, 1.1],
      [15, 1.05],
      [20, 1],
      [25, 0.95],
      [30, 0.89],
      [35, 0.84],
      [40, 0.77],
      [45, 0.71],
      [50, 0.63],
      [55, 0.55],
      [60, 0.45],
    ],
    true,
  ),
};

export const IEC_GROUND_XLPE: Table = {
  title: 'Table B.52.15, XLPE',
  source: 'IEC 60364-5-52:2009 Table B.52.15; sqrt((90 - T) / 70)',
  rows: rows(
    [
      [10, 1.07],
      [15, 1.04],
      [20, 1],
      [25, 0.96],
      [30, 0.93],
      [35, 0.89],
      [40, 0.85],
      [45, 0.8],
      [50, 0.76],
      [55, 0.71],
      [60, 0.65],
    ],
    true,
  ),
};

export const GROUPED_BUNCHED: Table = {
  title: 'Bunched in air, on a surface, embedded or enclosed',
  source: 'BS 7671 Table 4C1 item 1 / IEC 60364-5-52 Table B.52.17 item 1, 17th Edition handbook p. 60',
  rows: rows(
    [
      [1, 1],
      [2, 0.8],
      [3, 0.7],
      [4, 0.65],
      [5, 0.6],
      [6, 0.57],
      [7, 0.54],
      [8, 0.52],
      [9, 0.5],
      [12, 0.45],
      [16, 0.41],
      [20, 0.38],
    ],
    false,
  ),
};

export const GROUPED_SINGLE_LAYER: Table = {
  title: 'Single layer on a wall or floor, method C',
  source: 'BS 7671 Table 4C1 item 2, 17th Edition handbook p. 60',
  rows: rows(
    [
      [1, 1],
      [2, 0.85],
      [3, 0.79],
      [4, 0.75],
      [5, 0.73],
      [6, 0.72],
      [7, 0.72],
      [8, 0.71],
      [9, 0.7],
      [12, 0.7],
      [16, 0.7],
      [20, 0.7],
    ],
    false,
  ),
};

/** By mm of the run totally surrounded; 0.5 for half a metre and more. */
export const INSULATED: Table = {
  title: 'Table 52.2, totally surrounded by thermal insulation',
  source: 'BS 7671 Table 52.2; 100 mm On-Site Guide Table F2, 400 mm a forum copy, 500 mm Whitfield 4.3.6',
  rows: [
    { at: 0, value: 1, memory: false },
    { at: 50, value: 0.88, memory: true },
    { at: 100, value: 0.78, memory: false },
    { at: 200, value: 0.63, memory: true },
    { at: 400, value: 0.51, memory: false },
    { at: 500, value: 0.5, memory: false },
  ],
};
