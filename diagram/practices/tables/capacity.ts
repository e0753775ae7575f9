import type { CapacityTable, Insulation, Material, Method, Row } from '../types';

/** Current-carrying capacity, A, two loaded conductors. To the digit printed; see each table's source. */

const IEC = 'IEC 60364-5-52:2009';

const rows = (sizes: readonly number[], amps: readonly number[], memory: boolean | readonly boolean[]): Row[] =>
  sizes.map((at, i) => ({ at, value: amps[i]!, memory: typeof memory === 'boolean' ? memory : memory[i]! }));

const table = (
  method: Method,
  title: string,
  source: string,
  list: Row[],
  material: Material = 'Cu',
  insulation: Insulation = 'PVC',
): CapacityTable => ({
  method,
  title,
  source,
  rows: list,
  material,
  insulation,
  referenceC: method === 'D1' ? 20 : 30,
});

const UP_TO_35 = [1.5, 2.5, 4, 6, 10, 16, 25, 35];
const FROM_1 = [1, ...UP_TO_35];

const iecCu = (method: Method, amps: readonly number[]) =>
  table(
    method,
    `Table B.52.2, ${method}`,
    `${IEC} Table B.52.2, two loaded conductors, PVC, copper, column ${method}`,
    rows(UP_TO_35, amps, true),
  );
const iecCuXlpe = (method: Method, amps: readonly number[]) =>
  table(
    method,
    `Table B.52.3, ${method}`,
    `${IEC} Table B.52.3, two loaded conductors, XLPE, copper, column ${method}`,
    rows(UP_TO_35, amps, true),
    'Cu',
    'XLPE',
  );
const iecAl = (method: Method, amps: readonly number[]) =>
  table(
    method,
    `Table B.52.2, ${method}, aluminium`,
    `${IEC} Table B.52.2, two loaded conductors, PVC, aluminium, column ${method}`,
    rows(UP_TO_35.slice(1), amps, true),
    'Al',
  );
const iecAlXlpe = (method: Method, amps: readonly number[]) =>
  table(
    method,
    `Table B.52.3, ${method}, aluminium`,
    `${IEC} Table B.52.3, two loaded conductors, XLPE, aluminium, column ${method}`,
    rows(UP_TO_35.slice(1), amps, true),
    'Al',
    'XLPE',
  );

/** IEC 60364-5-52:2009 annex B, from memory; D1 at 20 degC of the ground and 2.5 K m/W. */
export const IEC_CAPACITY: readonly CapacityTable[] = [
  iecCu('A1', [14.5, 19.5, 26, 34, 46, 61, 80, 99]),
  iecCu('A2', [14, 18.5, 25, 32, 43, 57, 75, 92]),
  iecCu('B1', [17.5, 24, 32, 41, 57, 76, 101, 125]),
  iecCu('B2', [16.5, 23, 30, 38, 52, 69, 90, 111]),
  iecCu('C', [19.5, 27, 36, 46, 63, 85, 112, 138]),
  iecCu('D1', [22, 29, 37, 46, 60, 78, 99, 119]),
  iecCuXlpe('A1', [19, 26, 35, 45, 61, 81, 106, 131]),
  iecCuXlpe('A2', [18.5, 25, 33, 42, 57, 76, 99, 121]),
  iecCuXlpe('B1', [23, 31, 42, 54, 75, 100, 133, 164]),
  iecCuXlpe('B2', [22, 30, 40, 51, 69, 91, 119, 146]),
  iecCuXlpe('C', [24, 33, 45, 58, 80, 107, 138, 171]),
  iecCuXlpe('D1', [25, 33, 43, 53, 71, 91, 116, 139]),
  iecAl('A1', [15, 20, 26, 36, 48, 63, 77]),
  iecAl('A2', [14.5, 19.5, 25, 33, 44, 58, 71]),
  iecAl('B1', [18.5, 25, 32, 44, 60, 79, 97]),
  iecAl('B2', [17.5, 24, 30, 41, 54, 71, 86]),
  iecAl('C', [21, 28, 36, 49, 66, 83, 103]),
  iecAl('D1', [22, 29, 36, 47, 61, 77, 93]),
  iecAlXlpe('A1', [20, 27, 35, 48, 64, 84, 103]),
  iecAlXlpe('A2', [19.5, 26, 33, 45, 60, 78, 96]),
  iecAlXlpe('B1', [25, 33, 43, 59, 79, 105, 130]),
  iecAlXlpe('B2', [23, 31, 40, 54, 72, 94, 115]),
  iecAlXlpe('C', [26, 35, 45, 62, 84, 101, 126]),
  iecAlXlpe('D1', [26, 33, 42, 55, 71, 90, 108]),
];

const SINGLE = 'BS 7671 Table 4D1A (single-core, two cables), text copy "Cable Size" document';
const MULTI = 'BS 7671 Table 4D2A (multicore, one two-core cable)';
const TWIN = 'BS 7671 Table 4D5 (flat twin and earth), E. Palmer reference copy for 1 and 1.5 mm2';

/**
 * BS 7671. Single-core in conduit for A1 and B1, multicore in conduit for A2 and B2. Method C is the flat
 * twin-and-earth
 * cable a house there is wired in (4D5) up to its largest size, 16 mm2, then multicore (4D2A). Buried ducts, 90 degC
 * insulation and aluminium: no British table was open; the IEC one stands in.
 */
export const BS_CAPACITY: readonly CapacityTable[] = [
  table('A1', 'Table 4D1A, method A', SINGLE, rows(FROM_1, [11, 14.5, 20, 26, 34, 46, 61, 80, 99], false)),
  table('A2', 'Table 4D2A, method A', MULTI, rows(FROM_1, [11, 14, 18.5, 25, 32, 43, 57, 75, 92], true)),
  table('B1', 'Table 4D1A, method B', SINGLE, rows(FROM_1, [13.5, 17.5, 24, 32, 41, 57, 76, 101, 125], false)),
  table(
    'B2',
    'Table 4D2A, method B',
    MULTI,
    rows(FROM_1, [13, 16.5, 23, 30, 38, 52, 69, 90, 111], [false, false, true, true, true, true, true, true, true]),
  ),
  table(
    'C',
    'Table 4D5, method C; Table 4D2A from 25 mm2',
    `${TWIN}; ${MULTI}`,
    rows(FROM_1, [16, 20, 27, 37, 47, 64, 85, 112, 138], [false, false, true, true, true, true, true, true, true]),
  ),
  ...IEC_CAPACITY.filter((t) => t.method === 'D1' || t.insulation === 'XLPE' || t.material === 'Al'),
];
