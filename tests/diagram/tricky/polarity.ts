import { Home, smallHome } from '@/diagram/document/home';
import { twoRooms, type Tricky } from './tricky';

const lamp = { watts: 12, pf: 0.9, class: 1, fixed: true } as const;

/** Polarity, switches and the earth. */
export const POLARITY: Record<string, Tricky> = {
  'an outlet behind a switch that opens its neutral': {
    drawing: twoRooms().part('switch', 'S7', 'study').cut('JN11', 'X1').neutral('JN11', 'S7:1').neutral('S7:2', 'X1:N'),
    found: ['switched-neutral'],
    at: ['S7'],
  },
  'a lamp between the commons of two switches that each choose line or neutral': {
    drawing: twoRooms()
      .part('switch-2way', 'S31', 'study', { rating: 6 })
      .part('switch-2way', 'S32', 'study', { rating: 6 })
      .part('lamp', 'E3', 'study', lamp)
      .line('JL11', 'S31:1')
      .neutral('JN11', 'S31:2')
      .line('JL11', 'S32:1')
      .neutral('JN11', 'S32:2')
      .switched('S31:C', 'E3:L')
      .switched('S32:C', 'E3:N')
      .earth('JE11', 'E3:E'),
    found: ['switched-neutral'],
    at: ['S31', 'S32'],
  },
  'three places work a lamp, the middle switch crossed': {
    drawing: threePlaces(['1', '3'], ['2', '4']),
    found: [],
  },
  'three places, the strappers turned at the middle switch': {
    drawing: threePlaces(['3', '1'], ['2', '4']),
    found: [],
  },
  'three places, both strappers of one side on one pole of the middle switch': {
    drawing: threePlaces(['1', '2'], ['3', '4']),
    found: ['two-way-miswired'],
    at: ['S32'],
  },
  'a two-way set with common and strapper changed over at one switch': {
    drawing: twoRooms()
      .part('switch-2way', 'S31', 'study', { rating: 6 })
      .part('switch-2way', 'S32', 'study', { rating: 6 })
      .part('lamp', 'E3', 'study', lamp)
      .line('JL11', 'S31:C')
      .wire('strapper', 'S31:1', 'S32:1')
      .wire('strapper', 'S31:2', 'S32:C')
      .switched('S32:2', 'E3:L')
      .neutral('JN11', 'E3:N')
      .earth('JE11', 'E3:E'),
    found: ['two-way-miswired'],
  },
  'a switch in the line and another in the neutral of one lamp': {
    drawing: twoRooms()
      .part('switch', 'S7', 'study')
      .cut('JN11', 'E1')
      .neutral('JN11', 'S7:1')
      .neutral('S7:2', 'E1:N', 'cE1'),
    found: ['switched-neutral'],
    at: ['S7'],
  },
  'a fan regulator in the neutral': {
    drawing: twoRooms()
      .fan('M1', 'S4', 'R4', 'Q11')
      .cut('R4:2', 'M1:L')
      .cut('S4:2', 'R4:1')
      .cut('JN11', 'M1:N')
      .switched('S4:2', 'M1:L', 'cM1')
      .neutral('JN11', 'R4:1')
      .neutral('R4:2', 'M1:N', 'cM1'),
    found: ['switched-neutral'],
    at: ['R4'],
  },
  'line and neutral changed at the meter: the whole home the wrong way round': {
    drawing: twoRooms().move('P1:2', 'SUP:N', 'P1:1').move('P1:1', 'F1:2', 'P1:2'),
    found: ['reversed-polarity'],
  },
  'changed at the meter and changed back at the main switch': {
    drawing: smallHome()
      .move('P1:2', 'SUP:N', 'P1:1')
      .move('P1:1', 'F1:2', 'P1:2')
      .move('Q1:1', 'P1:4', 'Q1:3')
      .move('Q1:3', 'P1:3', 'Q1:1'),
    found: ['line-role-mismatch', 'line-role-mismatch'],
  },
  'the supply fused in its neutral instead of its line': {
    drawing: smallHome()
      .cut('SUP:L', 'F1')
      .cut('F1', 'P1')
      .cut('SUP:N', 'P1')
      .line('SUP:L', 'P1:1')
      .neutral('SUP:N', 'F1:1')
      .neutral('F1:2', 'P1:2'),
    found: ['fused-neutral'],
    at: ['F1'],
  },
  'a single-pole breaker in the line and another in the neutral': {
    drawing: smallHome()
      .part('mcb', 'Q12', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000 })
      .cut('NB', 'JN11')
      .neutral('NB', 'Q12:1')
      .neutral('Q12:2', 'JN11', 'k11'),
    found: ['fused-neutral'],
    at: ['Q12'],
  },
  'a lamp that returns through the water pipe': {
    drawing: twoRooms()
      .part('bond', 'WATER', 'study', { to: 'water' })
      .earth('WATER:E', 'EB')
      .cut('JN11', 'E1')
      .neutral('E1:N', 'WATER:E'),
    found: ['open-neutral'],
    at: ['E1'],
  },
  'the earth of a fixed heater comes by a plug alone': {
    drawing: smallHome()
      .heater('E5', 'S5', 'Q11')
      .cut('JE11', 'E5')
      .part('plug', 'PL1', 'study', { in: 'X1' })
      .earth('PL1:E', 'E5:E'),
    found: ['switched-earth'],
    at: ['PL1'],
  },
  'an isolator that opens line, neutral by its other pole, and a third one the earth': {
    drawing: smallHome()
      .part('isolator', 'Q8', 'study', { poles: 2, rating: 20 })
      .part('isolator', 'Q9', 'study', { poles: 1, rating: 20 })
      .part('appliance', 'E5', 'study', { watts: 500, pf: 1, class: 1, fixed: true })
      .line('JL11', 'Q8:1')
      .neutral('JN11', 'Q8:3')
      .line('Q8:2', 'E5:L')
      .neutral('Q8:4', 'E5:N')
      .earth('JE11', 'Q9:1')
      .earth('Q9:2', 'E5:E'),
    found: ['switched-earth'],
    at: ['Q9'],
  },
  'line and earth changed at a class 1 lamp': {
    drawing: smallHome()
      .move('E1:L', 'S1:2', 'E1:E')
      .move('E1:E', 'JE11', 'E1:L'),
    found: ['missing-earth'],
    at: ['E1'],
  },
  'neutral and earth changed at an outlet': {
    drawing: smallHome().move('X1:N', 'JN11', 'X1:E').move('X1:E', 'JE11', 'X1:N'),
    found: ['missing-earth'],
    at: ['X1'],
  },
  'a lamp of class 2 without earth on a cable that has one': {
    drawing: smallHome().lamp('E6', 'S6', 'Q11', { class: 2 }),
    found: [],
  },
  'a switch wire that goes down as blue and comes back as brown': {
    drawing: smallHome()
      .cut('S1:2', 'E1:L')
      .wire('switched', 'S1:2', 'E1:L', 'cE1', { colour: 'BU' }),
    found: ['wrong-colour'],
  },
  'a lamp with a switch on either side of one outlet loop': {
    drawing: smallHome().lamp('E3', 'S3', 'Q11').cut('JL11', 'S3').line('S1:1', 'S3:1'),
    found: [],
  },
};

/** Lamp E3 from three places: S31, cross switch S32, S33; strappers land on the given terminals of S32. */
function threePlaces([in1, in2]: [string, string], [out1, out2]: [string, string]): Home {
  return twoRooms()
    .part('switch-2way', 'S31', 'study', { rating: 6 })
    .part('switch-cross', 'S32', 'study', { rating: 6 })
    .part('switch-2way', 'S33', 'study', { rating: 6 })
    .part('lamp', 'E3', 'study', lamp)
    .line('JL11', 'S31:C')
    .wire('strapper', 'S31:1', `S32:${in1}`)
    .wire('strapper', 'S31:2', `S32:${in2}`)
    .wire('strapper', `S32:${out1}`, 'S33:1')
    .wire('strapper', `S32:${out2}`, 'S33:2')
    .switched('S33:C', 'E3:L')
    .neutral('JN11', 'E3:N')
    .earth('JE11', 'E3:E') as Home;
}
