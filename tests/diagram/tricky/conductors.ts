import { backupHome, Home, smallHome } from '@/diagram/document/home';
import { twoRooms, type Tricky } from './tricky';

const lamp = { watts: 12, pf: 0.9, class: 1, fixed: true } as const;

/** Cores that lead where they should not, one by one. */
export const CONDUCTORS: Record<string, Tricky> = {
  'a switched line of one way lights a lamp on the neutral of another': {
    drawing: twoRooms().cut('S2:2', 'E2:L').switched('S1:2', 'E2:L'),
    found: ['borrowed-neutral', 'open-terminal'],
    at: ['E2'],
  },
  'outlets in a row, line and neutral changed from the second on': {
    drawing: chain().move('X6:L', 'X5:L', 'X6:N').move('X6:N', 'X5:N', 'X6:L'),
    found: ['reversed-polarity'],
    at: ['X6', 'X7'],
  },
  'outlets in a row, led on at their terminals': { drawing: chain(), found: [] },
  'line and earth of a whole way changed at the joints of the room: every case is live': {
    drawing: smallHome().move('JL11', 'Q11:2', 'JE11').move('JE11', 'EB', 'JL11'),
    found: ['missing-earth'],
    at: ['E1', 'X1'],
  },
  'a line led round the rcd': {
    drawing: smallHome().line('LB0', 'LB'),
    found: ['mixed-feeds'],
    at: ['LB0', 'LB'],
  },
  'a line led round the breaker of its way': {
    drawing: smallHome().line('LB', 'JL11', 'k11'),
    found: ['mixed-feeds'],
    at: ['Q11'],
  },
  'a two-pole switch with its outgoing cores crossed': {
    drawing: smallHome()
      .heater('E5', 'S5', 'Q11', { watts: 300 })
      .move('S5:2', 'E5:L', 'S5:9')
      .move('S5:4', 'E5:N', 'S5:2')
      .move('S5:9', 'E5:L', 'S5:4'),
    found: ['reversed-polarity'],
    at: ['E5'],
  },
  'a two-pole switch with a way in each pole': {
    drawing: twoRooms()
      .part('switch-2pole', 'S9', 'study', { rating: 20 })
      .part('lamp', 'E8', 'study', lamp)
      .part('lamp', 'E9', 'den', lamp)
      .line('JL11', 'S9:1')
      .line('JL12', 'S9:3')
      .switched('S9:2', 'E8:L')
      .switched('S9:4', 'E9:L')
      .neutral('JN11', 'E8:N')
      .neutral('JN12', 'E9:N')
      .earth('JE11', 'E8:E')
      .earth('JE12', 'E9:E'),
    found: [],
  },
  'a lamp between line and switched line': {
    drawing: smallHome().cut('JN11', 'E1').line('JL11', 'E1:N', 'cE1'),
    found: ['open-neutral'],
    at: ['E1'],
  },
  'the green-yellow core as switched line': {
    drawing: smallHome().cut('S1:2', 'E1:L').wire('switched', 'S1:2', 'E1:L', 'cE1', { colour: 'GNYE' }),
    found: ['wrong-colour'],
  },
  'a neutral core thinner than the line of its way': {
    drawing: new Home()
      .place('den', 'room', { name: 'Den' })
      .way('Q12', 'den', { rating: 20 }, { csa: 4 })
      .heater('E2', 'S2', 'Q12', { watts: 2000 })
      .cable('cE2', 4, 1)
      .cable('kn', 1.5, 9)
      .cut('NB', 'JN12')
      .neutral('NB', 'JN12', 'kn'),
    found: ['undersized-cable'],
    at: ['Q12'],
  },
  'a neutral of its own, as thick as the line': {
    drawing: new Home()
      .place('den', 'room', { name: 'Den' })
      .way('Q12', 'den', { rating: 20 }, { csa: 4 })
      .heater('E2', 'S2', 'Q12', { watts: 2000 })
      .cable('cE2', 4, 1)
      .cable('kn', 4, 9)
      .cut('NB', 'JN12')
      .neutral('NB', 'JN12', 'kn'),
    found: [],
  },
  'the neutral of the whole home lost at the meter': {
    drawing: twoRooms().cut('P1:3', 'Q1:3'),
    found: ['open-neutral'],
    at: ['P1', 'Q1', 'NB0', 'NB'],
  },
  'the earth core of an outlet on the neutral joint': {
    drawing: smallHome().move('JE11', 'X1', 'JN11'),
    found: ['missing-earth'],
    at: ['X1'],
  },
  'an outlet in a bath within reach': {
    drawing: new Home()
      .place('bath', 'wet', { name: 'Bathroom', zone: 1 })
      .way('Q12', 'bath')
      .socket('X2', 'Q12'),
    found: ['wet-place-socket'],
    at: ['X2'],
  },
  'a shaver outlet in the same place': {
    drawing: new Home({ practice: 'GB' })
      .place('bath', 'wet', { name: 'Bathroom', zone: 2 })
      .way('Q12', 'bath')
      .socket('X2', 'Q12', { rating: 1, pattern: 'shaver', class: 2 })
      .cut('JE12', 'X2'),
    found: [],
  },
  'a lamp behind the regulator of the fan': {
    drawing: smallHome()
      .fan('M1', 'S4', 'R4', 'Q11')
      .part('lamp', 'E4', 'study', { ...lamp, class: 2 })
      .switched('R4:2', 'E4:L')
      .neutral('JN11', 'E4:N'),
    found: ['regulator-feeds-other'],
    at: ['R4', 'E4'],
  },
  'neutral bars of mains and backup linked': {
    drawing: backupHome().neutral('NB', 'NB2'),
    found: ['backup-neutral-behind-other-rcd'],
    at: ['NB', 'NB2'],
  },
  'a bonded inverter in a home on TT': {
    drawing: backupHome({}, { supply: { system: 'TT', ra: 50, zln: 0.3 } }),
    found: [],
  },
  'an inverter without bond behind a main switch of one pole: the supply keeps its earth': {
    drawing: backupHome({ bond: false })
      .set('Q1', { poles: 1 })
      .cut('P1:3', 'Q1')
      .cut('Q1:4', 'NB0')
      .neutral('P1:3', 'NB0'),
    found: ['single-pole-main'],
  },
  'the inverter itself without earth': {
    drawing: backupHome().cut('EB', 'G1:in.E'),
    found: ['missing-earth'],
    at: ['G1'],
  },
  'two ways on one breaker': {
    drawing: twoRooms().cut('Q12:2', 'JL12').cut('LB', 'Q12:1').drop('Q12').line('Q11:2', 'JL12', 'k12'),
    found: [],
  },
  'a lamp fed behind an outlet with a switch': {
    drawing: smallHome()
      .part('lamp', 'E4', 'study', { ...lamp, class: 2 })
      .line('X1:L', 'E4:L')
      .neutral('X1:N', 'E4:N'),
    found: ['permanent-feed'],
    at: ['E4'],
  },
  'one switch for two lamps': {
    drawing: smallHome()
      .part('lamp', 'E4', 'study', { ...lamp, class: 2 })
      .switched('S1:2', 'E4:L')
      .neutral('JN11', 'E4:N'),
    found: [],
  },
};

/** X5, X6 and X7 in a row behind the joints of the study. */
function chain(): Home {
  const home = smallHome();
  home.part('socket', 'X5', 'study', { rating: 6, load: 50 });
  home.part('socket', 'X6', 'study', { rating: 6, load: 50 });
  home.part('socket', 'X7', 'study', { rating: 6, load: 50 });
  home.line('JL11', 'X5:L').neutral('JN11', 'X5:N').earth('JE11', 'X5:E');
  for (const [from, to] of [
    ['X5', 'X6'],
    ['X6', 'X7'],
  ] as const)
    home.line(`${from}:L`, `${to}:L`).neutral(`${from}:N`, `${to}:N`).earth(`${from}:E`, `${to}:E`);
  return home;
}
