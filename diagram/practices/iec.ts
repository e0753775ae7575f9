import type { ColourScheme, Practice } from './types';
import { IEC_CAPACITY } from './tables/capacity';
import * as common from './tables/common';
import {
  GROUPED_BUNCHED,
  GROUPED_SINGLE_LAYER,
  IEC_AMBIENT_PVC,
  IEC_AMBIENT_XLPE,
  IEC_GROUND_PVC,
  IEC_GROUND_XLPE,
  INSULATED,
} from './tables/factors';

const { said, recalled, trade } = common;
const COLOURS = 'IEC 60445; cable maker page with the IEC colour column';

/** Brown, blue, green-yellow; switched lines and strappers may be any colour but blue and green-yellow. */
export const IEC_COLOURS: ColourScheme = {
  id: 'IEC',
  name: 'brown, blue, green-yellow',
  colours: {
    line: said(['BN', 'BK', 'GY'], COLOURS),
    switched: trade(
      ['BN', 'BK', 'GY', 'RD', 'OG', 'VT', 'WH', 'PK'],
      'IEC 60445 leaves a switched line free but for blue and green-yellow; from memory',
    ),
    strapper: trade(
      ['BK', 'GY', 'BN', 'RD', 'OG', 'VT', 'WH', 'PK'],
      'IEC 60445 leaves a switched line free but for blue and green-yellow; from memory',
    ),
    neutral: said(['BU'], COLOURS),
    earth: said(['GNYE'], COLOURS),
    'dc+': trade(
      ['RD', 'BN'],
      'red for battery positive: common practice; IEC 60445:2017 red, before 2017 brown, from memory',
    ),
    'dc-': trade(
      ['BK', 'WH', 'GY'],
      'black for battery negative: common practice; IEC 60445:2017 white, before 2017 grey, from memory',
    ),
  },
};

/** The international text, where no country's own code is named. */
export const IEC: Practice = {
  id: 'IEC',
  name: 'IEC 60364',
  standard: 'IEC 60364',
  colourSchemes: [IEC_COLOURS],
  sockets: [
    {
      id: 'CEE 7/3',
      name: 'side-earthed, 16 A',
      ratingA: 16,
      earthed: true,
      source: 'CEE 7 standard sheet III',
      memory: true,
    },
    {
      id: 'CEE 7/5',
      name: 'pin-earthed, 16 A',
      ratingA: 16,
      earthed: true,
      source: 'CEE 7 standard sheet V',
      memory: true,
    },
    {
      id: 'CEE 7/1',
      name: 'two-pin without earth, 10 A',
      ratingA: 10,
      earthed: false,
      source: 'CEE 7 standard sheet I',
      memory: true,
    },
    { id: 'IEC 60309-32', name: 'industrial, 32 A', ratingA: 32, earthed: true, source: 'IEC 60309-2', memory: true },
    {
      id: 'shaver',
      name: 'shaver outlet with separated winding',
      ratingA: 0.2,
      earthed: false,
      shaver: true,
      source: 'IEC 61558-2-5',
      memory: true,
    },
  ],
  voltDrop: {
    lighting: recalled(3, 'IEC 60364-5-52 Table G.52.1, public supply, lighting'),
    other: recalled(5, 'IEC 60364-5-52 Table G.52.1, public supply, other uses'),
    longRun: common.LONG_RUN,
  },
  disconnection: common.DISCONNECTION,
  cMin: common.CMIN,
  cMax: common.CMAX,
  touchVolts: common.TOUCH_VOLTS,
  measuredShare: common.MEASURED_SHARE,
  diversity: common.household('IEC 60364 prints no table for homes; the British allowances stand in'),
  wayDiversity: [],
  capacity: IEC_CAPACITY,
  ambient: {
    PVC: { air: IEC_AMBIENT_PVC, ground: IEC_GROUND_PVC },
    XLPE: { air: IEC_AMBIENT_XLPE, ground: IEC_GROUND_XLPE },
  },
  grouping: { bunched: GROUPED_BUNCHED, singleLayer: GROUPED_SINGLE_LAYER },
  insulated: INSULATED,
  csaMm2: common.CSA_MM2.slice(1),
  cpcMm2: said(
    { '1': 1, '1.5': 1.5, '2.5': 2.5, '4': 4, '6': 6, '10': 10, '16': 16, '25': 16, '35': 16 },
    'IEC 60364-5-54 Table 54.2 (as BS 7671 Table 54.7, the-regs blog)',
  ),
  breakerRatingsA: common.BREAKER_RATINGS,
  breakingCapacitiesA: common.BREAKING_CAPACITIES,
  rcdSensitivitiesA: common.RCD_SENSITIVITIES,
  pointsLimits: [],
  rcdDuties: [
    recalled({ of: 'sockets', uptoA: 32, sensitivityA: 0.03 }, 'IEC 60364-4-41 411.3.3'),
    recalled({ of: 'wet', sensitivityA: 0.03 }, 'IEC 60364-7-701 701.415.1'),
    recalled({ of: 'tt', sensitivityA: 0.5 }, 'IEC 60364-4-41 411.5.2, 411.5.3'),
  ],
  wetSocketDistanceM: common.WET_DISTANCE,
  backupIsolationPoles: recalled(
    2,
    'IEC 60364-5-55 551.6, 551.7; 2 in TT, taken for all systems',
    'an inverter neutral without a sure earth is a live conductor',
  ),
  draft: {
    method: 'B1',
    material: 'Cu',
    insulation: 'PVC',
    grouped: 3,
    lighting: { ratingA: 10, curve: 'B', csaMm2: 1.5, poles: 1 },
    outlets: { ratingA: 16, curve: 'B', csaMm2: 2.5, poles: 1 },
    heavy: { ratingA: 16, curve: 'C', csaMm2: 2.5, poles: 1 },
    backup: { ratingA: 6, curve: 'B', csaMm2: 1.5, poles: 1 },
    icnA: 6000,
    rcdType: 'A',
    socket: 'CEE 7/3',
    heavySocket: 'CEE 7/3',
    switchA: 10,
    source: 'common practice, no source',
    memory: true,
  },
};
