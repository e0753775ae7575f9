import type { ColourScheme, Practice } from './types';
import { IEC_CAPACITY } from './tables/capacity';
import * as common from './tables/common';
import { IEC, IEC_COLOURS } from './iec';

const { said, recalled, trade } = common;
const COLOURS = 'wire colour code pages for India (one names IS 732:2019)';
const DISPUTED = 'another cable maker calls the IEC colours current practice: both schemes are accepted';

/** Red, black, green. Blue is left out as a line: it is the neutral of the other scheme. */
const INDIAN: ColourScheme = {
  id: 'IN',
  name: 'red, black, green',
  colours: {
    line: said(['RD', 'YE'], COLOURS, DISPUTED),
    switched: trade(
      ['RD', 'YE', 'OG', 'WH', 'GY', 'BN', 'VT'],
      'a switched line may be any colour but black, blue and green: common practice',
    ),
    strapper: trade(
      ['YE', 'RD', 'OG', 'WH', 'GY', 'BN', 'VT'],
      'a strapper may be any colour but black, blue and green: common practice',
    ),
    neutral: said(['BK'], COLOURS, DISPUTED),
    earth: said(['GN', 'GNYE'], COLOURS, DISPUTED),
    'dc+': trade(['RD'], 'red for battery positive: common practice'),
    'dc-': trade(['BK', 'BU'], 'black for battery negative: common practice'),
  },
};

const NOTE = 'Study note: sub-circuits (Indian practice)';
const SOCKETS = 'Note on IS 1293:2019 (2.5, 6 and 16 A, up to 250 V)';

/** India: IS 732 and the National Electrical Code, with the IEC's tables of capacity. */
export const IN: Practice = {
  ...IEC,
  id: 'IN',
  name: 'India, IS 732',
  standard: 'IS 732',
  colourSchemes: [INDIAN, IEC_COLOURS],
  sockets: [
    {
      id: 'IS1293-6',
      name: 'three-pin, 6 A',
      ratingA: 6,
      earthed: true,
      lineSide: 'right',
      source: `${SOCKETS}; side of the line from memory, sources disagree`,
      memory: false,
    },
    {
      id: 'IS1293-16',
      name: 'three-pin, 16 A',
      ratingA: 16,
      earthed: true,
      lineSide: 'right',
      source: `${SOCKETS}; side of the line from memory, sources disagree`,
      memory: false,
    },
    { id: 'IS1293-2.5', name: 'two-pin, 2.5 A', ratingA: 2.5, earthed: false, source: SOCKETS, memory: false },
    {
      id: 'shaver',
      name: 'shaver outlet with separated winding',
      ratingA: 0.2,
      earthed: false,
      shaver: true,
      source: 'IS/IEC 61558-2-5',
      memory: true,
    },
  ],
  voltDrop: {
    lighting: recalled(3, 'IS 732:2019', '1989 edition and notes say 2.5, 3 or 4 %'),
    other: recalled(5, 'IS 732:2019', '1989 edition and notes say 2.5, 3 or 4 %'),
    longRun: common.LONG_RUN,
  },
  diversity: common.household('IS 732 prints no table for homes; the British allowances stand in'),
  capacity: IEC_CAPACITY,
  pointsLimits: [
    said({ of: 'lighting', points: 10, watts: 800 }, NOTE),
    said({ of: 'power', fromA: 16, points: 2, watts: 3000 }, NOTE),
  ],
  rcdDuties: [
    recalled({ of: 'sockets', uptoA: 32, sensitivityA: 0.03 }, 'IS 732:2019 after IEC 60364-4-41 411.3.3'),
    recalled({ of: 'wet', sensitivityA: 0.03 }, 'IS 732:2019 after IEC 60364-7-701'),
    recalled({ of: 'tt', sensitivityA: 0.5 }, 'IS 732:2019 after IEC 60364-4-41 411.5.3'),
  ],
  draft: {
    method: 'B1',
    material: 'Cu',
    insulation: 'PVC',
    grouped: 1,
    lighting: { ratingA: 6, curve: 'B', csaMm2: 1.5, poles: 1 },
    outlets: { ratingA: 16, curve: 'C', csaMm2: 2.5, poles: 1 },
    heavy: { ratingA: 16, curve: 'C', csaMm2: 4, poles: 1 },
    backup: { ratingA: 6, curve: 'B', csaMm2: 1.5, poles: 1 },
    icnA: 6000,
    rcdType: 'A',
    socket: 'IS1293-6',
    heavySocket: 'IS1293-16',
    switchA: 6,
    source:
      'wires: Architect knowledge page, table of wire sizes (1.5 light, 2.5 outlets, 4 power); ratings: common practice, no source',
    memory: true,
  },
};
