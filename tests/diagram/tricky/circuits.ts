import { Home, smallHome } from '@/diagram/document/home';
import { extension, secondRcd, twoRcds, twoRooms, type Tricky } from './tricky';

/** Ways, neutrals and residual-current devices. */
export const CIRCUITS: Record<string, Tricky> = {
  'a lamp takes its line behind one rcd and returns behind the other': {
    drawing: twoRcds().lamp('E3', 'S3', 'Q11').move('JN11', 'E3', 'JN12'),
    found: ['borrowed-neutral'],
    at: ['E3'],
  },
  'a landing light: line from the way below, neutral from the way above, both behind one rcd': {
    drawing: twoRooms().twoWay('E3', 'S31', 'S32', 'Q11').move('JN11', 'E3', 'JN12'),
    found: ['borrowed-neutral'],
    at: ['E3'],
  },
  'the neutral bars of two rcds are linked': {
    drawing: twoRcds().neutral('NB', 'NB3'),
    found: ['borrowed-neutral'],
    at: ['NB', 'NB3'],
  },
  'the neutral cores of two whole ways have changed bars': {
    drawing: twoRcds().move('NB', 'JN11', 'NB3').move('NB3', 'JN12', 'NB'),
    found: ['borrowed-neutral', 'borrowed-neutral'],
  },
  'neutral touches earth behind the rcd, at an outlet': {
    drawing: twoRooms().wire('neutral', 'X1:N', 'X1:E'),
    found: ['earth-neutral-joined'],
    at: ['X1'],
  },
  'a second neutral goes round the rcd': {
    drawing: twoRooms().neutral('NB0', 'NB'),
    found: ['residual-imbalance'],
    at: ['NB0', 'NB', 'Q2'],
  },
  'an rcd whose neutral is fed from the wrong end: its two currents add up': {
    drawing: twoRooms().move('Q2:3', 'NB0', 'Q2:4').move('Q2:4', 'NB', 'Q2:3'),
    found: ['residual-imbalance'],
    at: ['Q2'],
  },
  'an rcd fed from below with both conductors': {
    drawing: twoRooms()
      .move('Q2:1', 'LB0', 'Q2:2')
      .move('Q2:2', 'LB', 'Q2:1')
      .move('Q2:3', 'NB0', 'Q2:4')
      .move('Q2:4', 'NB', 'Q2:3'),
    found: [],
  },
  'an rcbo with its line through the pole that does not watch the current': {
    drawing: twoRooms()
      .part('rcbo', 'Q14', 'hall', {
        poles: 1,
        rating: 6,
        curve: 'B',
        icn: 6000,
        sensitivity: 0.03,
        type: 'A',
        delay: 'none',
        label: 'Porch',
      })
      .place('porch', 'room', { name: 'Porch' })
      .part('lamp', 'E5', 'porch', { watts: 12, pf: 0.9, class: 1, fixed: true })
      .part('switch', 'S5', 'porch', { rating: 6 })
      .cable('k14', 1.5, 6)
      .line('LB0', 'Q14:3')
      .neutral('NB0', 'Q14:1')
      .line('Q14:4', 'S5:1', 'k14')
      .switched('S5:2', 'E5:L', 'k14')
      .neutral('Q14:2', 'E5:N', 'k14')
      .earth('EB', 'E5:E', 'k14'),
    found: ['fused-neutral'],
    at: ['Q14'],
  },
  'a ring of outlets on 32 A with a spur': {
    drawing: ring(),
    found: [],
  },
  'a ring whose line is broken between two outlets': {
    drawing: ring().cut('X11:L', 'X12:L'),
    found: ['undersized-cable'],
  },
  'a ring that ends on the next breaker': {
    drawing: ring()
      .part('mcb', 'Q16', 'hall', { poles: 1, rating: 32, curve: 'B', icn: 6000, label: 'Spare' })
      .line('LB', 'Q16:1')
      .move('Q15:2', 'X13:L', 'Q16:2'),
    found: ['mixed-feeds'],
    at: ['Q15', 'Q16'],
  },
  'two ways joined by a two-way switch that stands between their lines': {
    drawing: twoRooms()
      .part('switch-2way', 'S8', 'study', { rating: 6 })
      .part('lamp', 'E8', 'study', { watts: 12, pf: 0.9, class: 2, fixed: true })
      .line('JL11', 'S8:1')
      .line('JL12', 'S8:2')
      .switched('S8:C', 'E8:L')
      .neutral('JN11', 'E8:N'),
    found: ['borrowed-neutral'],
    at: ['E8'],
  },
  'a two-way set fed at both ends, each from its own way': {
    drawing: twoRooms().twoWay('E3', 'S31', 'S32', 'Q11').line('JL12', 'S32:1'),
    found: ['mixed-feeds'],
    at: ['Q11', 'Q12'],
  },
  'a two-pole breaker of which the neutral goes past': {
    drawing: twoRooms().set('Q11', { poles: 2 }),
    found: [],
  },
  'a lamp between the lines of two ways': {
    drawing: twoRooms()
      .part('lamp', 'E9', 'study', { watts: 12, pf: 0.9, class: 2, fixed: true })
      .line('JL11', 'E9:L')
      .line('JL12', 'E9:N'),
    found: ['mixed-feeds'],
    at: ['E9'],
  },
  'a lead of one way plugged into an outlet of another': {
    drawing: twoRooms()
      .part('plug', 'PL1', 'den', { in: 'X2' })
      .cable('cPL1', 1.5, 3)
      .line('JL11', 'PL1:L', 'cPL1')
      .neutral('JN11', 'PL1:N', 'cPL1')
      .earth('JE11', 'PL1:E', 'cPL1'),
    found: ['live-pins', 'mixed-feeds'],
  },
  'an extension lead in an outlet': { drawing: extension(twoRooms(), 'PL1', 'X1', 'X9', 'study'), found: [] },
  'an extension lead that lies on the floor': {
    drawing: extension(twoRooms(), 'PL1', undefined, 'X9', 'study'),
    found: [],
  },
  'a fused spur from the ring to a fixed heater': {
    drawing: ring()
      .part('fuse', 'F7', 'den', { rating: 13, standard: 'gG' })
      .part('appliance', 'E7', 'den', { watts: 2000, pf: 1, class: 1, fixed: true })
      .cable('c7', 1.5, 2)
      .line('X12:L', 'F7:1')
      .line('F7:2', 'E7:L', 'c7')
      .neutral('X12:N', 'E7:N', 'c7')
      .earth('X12:E', 'E7:E', 'c7'),
    found: [],
  },
  'three rcds in series, only the first delayed': {
    drawing: secondRcd(new Home({ supply: { system: 'TT', ra: 20, zln: 0.3 } }).place('den', 'room', { name: 'Den' }))
      .way('Q12', 'den', {}, { bars: '3' })
      .lamp('E2', 'S2', 'Q12'),
    found: [],
  },
  'a meter whose neutral runs past it': {
    drawing: smallHome().cut('SUP:N', 'P1:2').cut('P1:3', 'Q1:3').neutral('SUP:N', 'Q1:3'),
    found: ['open-terminal'],
    at: ['P1'],
  },
};

/** Outlets X10 to X13 in a ring on Q15, with a spur X14 from X12; as wired in Britain. */
function ring(): Home {
  const home = new Home({ practice: 'GB' }).place('den', 'room', { name: 'Den' });
  home.part('mcb', 'Q15', 'hall', { poles: 1, rating: 32, curve: 'B', icn: 6000, label: 'Ring' }).line('LB', 'Q15:1');
  for (const id of ['X10', 'X11', 'X12', 'X13', 'X14'])
    home.part('socket', id, 'den', { rating: 13, load: 300, pattern: 'BS1363' });
  const legs: [string, string, string][] = [
    ['board', 'X10', 'r1'],
    ['X10', 'X11', 'r2'],
    ['X11', 'X12', 'r3'],
    ['X12', 'X13', 'r4'],
    ['X13', 'board', 'r5'],
    ['X12', 'X14', 'r6'],
  ];
  for (const [from, to, cable] of legs) {
    const end = (id: string, board: string, mark: string) => (id === 'board' ? board : `${id}:${mark}`);
    home
      .cable(cable, 2.5, 8, { cpc: 1.5 })
      .line(end(from, 'Q15:2', 'L'), end(to, 'Q15:2', 'L'), cable)
      .neutral(end(from, 'NB', 'N'), end(to, 'NB', 'N'), cable)
      .earth(end(from, 'EB', 'E'), end(to, 'EB', 'E'), cable);
  }
  return home;
}
