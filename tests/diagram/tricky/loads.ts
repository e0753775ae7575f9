import { Home, smallHome } from '@/diagram/document/home';
import { twoRooms, type Tricky } from './tricky';

const appliance = { pf: 1, class: 1, fixed: true } as const;

/** Large loads, sub-boards, electrodes and the origin. */
export const LOADS: Record<string, Tricky> = {
  'a cooker on its own way behind a two-pole switch': {
    drawing: smallHome()
      .place('kitchen', 'room', { name: 'Kitchen' })
      .way('Q17', 'kitchen', { rating: 32 }, { csa: 6 })
      .part('switch-2pole', 'S7', 'kitchen', { rating: 45 })
      .part('appliance', 'E7', 'kitchen', { watts: 6500, ...appliance })
      .cable('c7', 6, 3)
      .line('JL17', 'S7:1')
      .neutral('JN17', 'S7:3')
      .switched('S7:2', 'E7:L', 'c7')
      .neutral('S7:4', 'E7:N', 'c7')
      .earth('JE17', 'E7:E', 'c7'),
    found: [],
  },
  'a shower in the bathroom on 10 mm2 behind the rcd': { drawing: shower(''), found: [] },
  'the same shower before the rcd': { drawing: shower('0'), found: ['no-rcd'], at: ['Q18', 'E8'] },
  'a car charger on its own rcbo of type B': {
    drawing: charger('B'),
    found: [],
  },
  'a sub-board in the garden house with its own rcd': { drawing: subBoard(), found: [] },
  'a sub-board fed by a long thin run that clears nothing in 5 s, with no load drawn yet': {
    drawing: feeder(1.5, 160),
    found: ['slow-disconnection'],
    at: ['Q40'],
  },
  'the same feeder in a size that clears in 5 s': { drawing: feeder(10, 40), found: [] },
  'a garden house with an electrode of its own and its earth not led back': {
    drawing: ownRod(),
    found: [],
  },
  'the same garden house without its rcd: the rod alone opens nothing': {
    drawing: ownRod(false),
    found: ['no-rcd'],
    at: ['Q50', 'E50'],
  },
  'TT with a 300 mA rcd of type S before everything and 30 mA behind it': {
    drawing: smallHome({ supply: { system: 'TT', ra: 100, zln: 0.3 } }),
    found: [],
  },
  'TT, a lamp on the 300 mA rcd alone, with an electrode of 200 ohm': {
    drawing: smallHome({ supply: { system: 'TT', ra: 200, zln: 0.3 } })
      .place('den', 'room', { name: 'Den' })
      .way('Q12', 'den', {}, { bars: '0' })
      .lamp('E2', 'S2', 'Q12'),
    found: ['no-rcd'],
    at: ['Q12', 'E2'],
  },
  'TN-S with an electrode at the earth bar as well': {
    drawing: smallHome().part('electrode', 'XE', 'hall').earth('XE:E', 'EB'),
    found: [],
  },
  'TN-C-S, neutral and earth joined once more at the main bar': {
    drawing: smallHome({ supply: { system: 'TN-C-S' } }).neutral('NB0', 'EB'),
    found: ['earth-neutral-joined'],
    at: ['NB0', 'EB'],
  },
  'TN-C-S with the joint drawn at the service': {
    drawing: smallHome({ supply: { system: 'TN-C-S' } })
      .cut('SUP:E', 'EB')
      .earth('SUP:N', 'EB'),
    found: [],
  },
  'a service without fuse, everything in one place': {
    drawing: oneRoom().cut('SUP:L', 'F1').drop('F1').line('SUP:L', 'P1:1'),
    found: ['no-overcurrent'],
  },
  'everything in one place, with the service fuse': { drawing: oneRoom(), found: [] },
  "the service's neutral core on the line of the supply": {
    drawing: twoRooms().move('SUP:N', 'P1:2', 'SUP:L'),
    found: ['open-neutral'],
    at: ['SUP'],
  },
  'the line of the service led to the earth bar': {
    drawing: twoRooms().move('F1:1', 'SUP:L', 'EB'),
    found: ['short-circuit'],
    at: ['SUP', 'EB'],
  },
  "the service's line core on the neutral of the supply: all is dead, every breaker stands in the neutral": {
    drawing: twoRooms().move('SUP:L', 'F1:1', 'SUP:N'),
    found: ['open-line'],
    at: ['SUP'],
  },
  "the service's line core on the earth of the supply": {
    drawing: twoRooms().move('SUP:L', 'F1:1', 'SUP:E'),
    found: ['open-line'],
    at: ['SUP'],
  },
  'the main earth core on the line of the supply': {
    drawing: twoRooms().move('SUP:E', 'EB', 'SUP:L'),
    found: ['short-circuit'],
    at: ['SUP', 'EB'],
  },
  'a way whose line begins on the neutral bar': {
    drawing: twoRooms().move('LB', 'Q11:1', 'NB'),
    found: ['open-line'],
    at: ['NB'],
  },
  'the line of the service led to the neutral bar': {
    drawing: twoRooms().move('F1:1', 'SUP:L', 'NB0'),
    found: ['short-circuit'],
    at: ['SUP', 'NB0'],
  },
  'a main switch of one pole': {
    drawing: smallHome()
      .set('Q1', { poles: 1 })
      .cut('P1:3', 'Q1')
      .cut('Q1:4', 'NB0')
      .neutral('P1:3', 'NB0'),
    found: ['single-pole-main'],
    at: ['Q1'],
  },
  'a heater on 2.5 mm2 continued in 1.0 mm2': {
    drawing: smallHome()
      .place('bath', 'room', { name: 'Utility' })
      .way('Q19', 'bath', { rating: 20 }, { csa: 2.5 })
      .heater('E9', 'S9', 'Q19', { watts: 2000 })
      .cable('cE9', 1, 4),
    found: ['undersized-cable'],
  },
  'a 16 A outlet on a lighting way': {
    drawing: twoRooms().socket('X8', 'Q11', { rating: 16 }),
    found: ['heavy-socket-on-light-way'],
    at: ['X8', 'Q11'],
  },
};

function shower(bars: string): Home {
  const home = smallHome({ practice: 'GB' }).place('bath', 'wet', { name: 'Bathroom', zone: 1 });
  home
    .way('Q18', 'bath', { rating: 40 }, { csa: 10, bars })
    .part('isolator', 'S8', 'bath', { poles: 2, rating: 45 })
    .part('appliance', 'E8', 'bath', { watts: 8500, ...appliance })
    .line('JL18', 'S8:1')
    .neutral('JN18', 'S8:3')
    .switched('S8:2', 'E8:L')
    .neutral('S8:4', 'E8:N')
    .earth('JE18', 'E8:E');
  return home;
}

function charger(type: 'AC' | 'A' | 'F' | 'B'): Home {
  const home = smallHome().place('drive', 'outdoor', { name: 'Drive' });
  home
    .part('rcbo', 'Q19', 'hall', {
      poles: 2,
      rating: 32,
      curve: 'C',
      icn: 6000,
      sensitivity: 0.03,
      type,
      delay: 'none',
      label: 'Car charger',
    })
    .part('appliance', 'E9', 'drive', { watts: 7000, label: 'Car charger', ...appliance })
    .cable('k19', 6, 12)
    .line('LB0', 'Q19:1')
    .neutral('NB0', 'Q19:3')
    .line('Q19:2', 'E9:L', 'k19')
    .neutral('Q19:4', 'E9:N', 'k19')
    .earth('EB', 'E9:E', 'k19');
  return home;
}

/** A board in the garden house: feeder Q40 (two poles), bars LB5 NB5 EB5, rcd Q42 and lamp E50 on way Q50. */
function subBoard(): Home {
  const home = feeder(10, 40);
  home
    .part('rcd', 'Q42', 'shed', { rating: 40, sensitivity: 0.03, type: 'A', delay: 'none' })
    .part('mcb', 'Q50', 'shed', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Shed light' })
    .part('switch', 'S50', 'shed', { rating: 6 })
    .part('lamp', 'E50', 'shed', { watts: 12, pf: 0.9, class: 1, fixed: true })
    .part('neutral-bar', 'NB6', 'shed')
    .cable('k50', 1.5, 4)
    .line('LB5', 'Q42:1')
    .neutral('NB5', 'Q42:3')
    .line('Q42:2', 'Q50:1')
    .neutral('Q42:4', 'NB6')
    .line('Q50:2', 'S50:1')
    .switched('S50:2', 'E50:L', 'k50')
    .neutral('NB6', 'E50:N', 'k50')
    .earth('EB5', 'E50:E', 'k50');
  return home;
}

function feeder(csa: number, length: number): Home {
  const home = smallHome().place('shed', 'room', { name: 'Garden house' });
  home
    .part('mcb', 'Q40', 'hall', { poles: 2, rating: 16, curve: 'C', icn: 6000, label: 'Garden house' })
    .part('isolator', 'Q41', 'shed', { poles: 2, rating: 40 })
    .part('line-bar', 'LB5', 'shed', { rating: 40 })
    .part('neutral-bar', 'NB5', 'shed')
    .part('earth-bar', 'EB5', 'shed')
    .cable('k40', csa, length)
    .line('LB0', 'Q40:1')
    .neutral('NB0', 'Q40:3')
    .line('Q40:2', 'Q41:1', 'k40')
    .neutral('Q40:4', 'Q41:3', 'k40')
    .earth('EB', 'EB5', 'k40')
    .line('Q41:2', 'LB5')
    .neutral('Q41:4', 'NB5');
  return home;
}

function ownRod(rcd = true): Home {
  const home = subBoardOf(rcd);
  home.cut('EB', 'EB5').part('electrode', 'XE5', 'shed').earth('XE5:E', 'EB5');
  return home;
}

function subBoardOf(rcd: boolean): Home {
  const home = subBoard();
  if (!rcd) home.drop('Q42').line('LB5', 'Q50:1').neutral('NB5', 'NB6');
  return home;
}

/** A home that is one room, the board in it. */
function oneRoom(): Home {
  const home = new Home();
  home
    .part('mcb', 'Q11', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Light' })
    .part('switch', 'S1', 'hall', { rating: 6 })
    .part('lamp', 'E1', 'hall', { watts: 12, pf: 0.9, class: 1, fixed: true })
    .line('LB', 'Q11:1')
    .line('Q11:2', 'S1:1')
    .switched('S1:2', 'E1:L')
    .neutral('NB', 'E1:N')
    .earth('EB', 'E1:E');
  return home;
}
