import type { Practice } from './types';
import { BS_CAPACITY } from './tables/capacity';
import * as common from './tables/common';
import {
  BS_AMBIENT_PVC,
  GROUPED_BUNCHED,
  GROUPED_SINGLE_LAYER,
  IEC_AMBIENT_XLPE,
  IEC_GROUND_PVC,
  IEC_GROUND_XLPE,
  INSULATED,
} from './tables/factors';
import { IEC_COLOURS } from './iec';

const { said, recalled } = common;
const OLD = 'BS 7671 514.14.1 and Appendix 7: colours before 2004-2006';
const LINSLEY = 'T. Linsley, Basic Electrical Installation Work (BS 7671 Appendix 4)';

/** Great Britain: BS 7671. */
export const GB: Practice = {
  id: 'GB',
  name: 'Great Britain, BS 7671',
  standard: 'BS 7671',
  colourSchemes: [
    { ...IEC_COLOURS, id: 'GB', name: 'brown, blue, green-yellow (since 2006)' },
    {
      id: 'GB-old',
      name: 'red, black, green-yellow (before 2006)',
      colours: {
        ...IEC_COLOURS.colours,
        line: recalled(['RD'], OLD),
        switched: recalled(['RD', 'YE', 'BU'], OLD),
        strapper: recalled(['YE', 'BU', 'RD'], OLD),
        neutral: recalled(['BK'], OLD),
        earth: recalled(['GNYE', 'GN'], OLD),
      },
    },
  ],
  sockets: [
    {
      id: 'BS1363',
      name: 'square-pin with fused plug, 13 A',
      ratingA: 13,
      earthed: true,
      lineSide: 'right',
      plugFuseA: 13,
      source: 'Encyclopaedia: British and related plugs and sockets',
      memory: false,
    },
    {
      id: 'BS546-5',
      name: 'round-pin, 5 A',
      ratingA: 5,
      earthed: true,
      lineSide: 'right',
      source: 'Encyclopaedia: British and related plugs and sockets',
      memory: false,
    },
    {
      id: 'BS546-15',
      name: 'round-pin, 15 A',
      ratingA: 15,
      earthed: true,
      lineSide: 'right',
      source: 'Encyclopaedia: British and related plugs and sockets',
      memory: false,
    },
    {
      id: 'BS546-2',
      name: 'round-pin, 2 A',
      ratingA: 2,
      earthed: true,
      lineSide: 'right',
      source: 'BS 546',
      memory: true,
    },
    {
      id: 'shaver',
      name: 'shaver outlet with separated winding',
      ratingA: 0.2,
      earthed: false,
      shaver: true,
      source: 'BS EN 61558-2-5',
      memory: true,
    },
  ],
  voltDrop: { lighting: said(3, LINSLEY), other: said(5, LINSLEY), longRun: common.LONG_RUN },
  disconnection: common.DISCONNECTION,
  cMin: common.CMIN,
  cMax: common.CMAX,
  touchVolts: common.TOUCH_VOLTS,
  measuredShare: common.MEASURED_SHARE,
  diversity: common.household(),
  wayDiversity: ['cooker'],
  capacity: BS_CAPACITY,
  ambient: {
    PVC: { air: BS_AMBIENT_PVC, ground: IEC_GROUND_PVC },
    XLPE: { air: IEC_AMBIENT_XLPE, ground: IEC_GROUND_XLPE },
  },
  grouping: { bunched: GROUPED_BUNCHED, singleLayer: GROUPED_SINGLE_LAYER },
  insulated: INSULATED,
  csaMm2: common.CSA_MM2,
  cpcMm2: said(
    { '1': 1, '1.5': 1, '2.5': 1.5, '4': 1.5, '6': 2.5, '10': 4, '16': 6, '25': 16, '35': 16 },
    'flat twin and earth, pairs of D. Locke, Guide to the Wiring Regulations, Appendix 4; 25 and 35 mm2 Table 54.7',
  ),
  breakerRatingsA: common.BREAKER_RATINGS,
  breakingCapacitiesA: common.BREAKING_CAPACITIES,
  rcdSensitivitiesA: common.RCD_SENSITIVITIES,
  pointsLimits: [],
  rcdDuties: [
    recalled({ of: 'sockets', uptoA: 32, sensitivityA: 0.03 }, 'BS 7671:2018 411.3.3'),
    recalled({ of: 'wet', sensitivityA: 0.03 }, 'BS 7671:2018 701.411.3.3'),
    recalled({ of: 'lighting', sensitivityA: 0.03 }, 'BS 7671:2018 411.3.4'),
    recalled({ of: 'tt', sensitivityA: 0.5 }, 'BS 7671:2018 411.5.2, 411.5.3'),
  ],
  wetSocketDistanceM: common.WET_DISTANCE,
  ring: recalled({ deviceA: 32, legCsaMm2: 2.5, legIzAtLeastA: 20 }, 'BS 7671 433.1.204'),
  backupIsolationPoles: said(
    2,
    'BS 7671:2018 462.1.201: for ordinary persons both live conductors of a single-phase supply; DIYnot thread',
  ),
  draft: {
    method: 'C',
    material: 'Cu',
    insulation: 'PVC',
    grouped: 1,
    lighting: { ratingA: 6, curve: 'B', csaMm2: 1.5, poles: 1 },
    outlets: { ratingA: 20, curve: 'B', csaMm2: 2.5, poles: 1 },
    heavy: { ratingA: 16, curve: 'B', csaMm2: 2.5, poles: 1 },
    backup: { ratingA: 6, curve: 'B', csaMm2: 1.5, poles: 1 },
    icnA: 6000,
    rcdType: 'A',
    socket: 'BS1363',
    heavySocket: 'BS1363',
    switchA: 10,
    source: 'common practice, no source',
    memory: true,
  },
};
