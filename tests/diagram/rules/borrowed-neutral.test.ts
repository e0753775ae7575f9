import { Home } from '@/diagram/document/home';
import { borrowedNeutral } from '@/diagram/rules/borrowed-neutral';
import { testRule } from '../rule-tester';

const twoWays = () =>
  new Home()
    .place('study')
    .place('den')
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .way('Q12', 'den')
    .lamp('E2', 'S2', 'Q12');

/** A second rcd Q6 with its own bars LB6 NB6. */
const twoRcds = () =>
  twoWays()
    .part('rcd', 'Q6', 'hall', { rating: 40, sensitivity: 0.03, type: 'A', delay: 'none' })
    .part('line-bar', 'LB6', 'hall')
    .part('neutral-bar', 'NB6', 'hall')
    .line('LB0', 'Q6:1')
    .neutral('NB0', 'Q6:3')
    .line('Q6:2', 'LB6')
    .neutral('Q6:4', 'NB6')
    .place('loft')
    .way('Q61', 'loft', {}, { bars: '6' })
    .lamp('E6', 'S6', 'Q61');

const rcbo = (home: Home, id: string, place: string) =>
  home
    .part('rcbo', id, 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, sensitivity: 0.03, type: 'A', label: id })
    .part('socket', `X${id}`, place, { rating: 6, load: 100 })
    .cable(`k${id}`, 1.5, 9)
    .line('LB0', `${id}:1`)
    .neutral('NB0', `${id}:3`)
    .line(`${id}:2`, `X${id}:L`, `k${id}`)
    .neutral(`${id}:4`, `X${id}:N`, `k${id}`)
    .earth('EB', `X${id}:E`, `k${id}`);

testRule(borrowedNeutral, {
  valid: {
    'each way its own neutral, one bar': twoWays(),
    'two rcds, each way on its own bar': twoRcds(),
    'a feeder to a board in another place carries the neutral of all its ways': new Home()
      .place('barn')
      .part('mcb', 'Q9', 'hall', { poles: 2, rating: 20, curve: 'C', icn: 6000, label: 'Barn' })
      .part('line-bar', 'LB9', 'barn')
      .part('neutral-bar', 'NB9', 'barn')
      .part('earth-bar', 'EB9', 'barn')
      .cable('kb', 4, 20)
      .line('LB', 'Q9:1')
      .neutral('NB', 'Q9:3')
      .line('Q9:2', 'LB9', 'kb')
      .neutral('Q9:4', 'NB9', 'kb')
      .earth('EB', 'EB9', 'kb')
      .part('mcb', 'Q91', 'barn', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'a' })
      .part('mcb', 'Q92', 'barn', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'b' })
      .part('socket', 'X91', 'barn', { rating: 6, load: 50 })
      .part('socket', 'X92', 'barn', { rating: 6, load: 50 })
      .line('LB9', 'Q91:1')
      .line('LB9', 'Q92:1')
      .line('Q91:2', 'X91:L')
      .neutral('NB9', 'X91:N')
      .earth('EB9', 'X91:E')
      .line('Q92:2', 'X92:L')
      .neutral('NB9', 'X92:N')
      .earth('EB9', 'X92:E'),
    'a fused spur takes the neutral of the way it hangs on': twoWays()
      .part('fuse', 'F7', 'study', { rating: 3, standard: 'gG', label: 'Spur' })
      .part('appliance', 'E7', 'study', { watts: 40, pf: 1, class: 2, fixed: true })
      .line('JL11', 'F7:1')
      .line('F7:2', 'E7:L')
      .neutral('JN11', 'E7:N'),
    'two fused spurs of one way': twoWays()
      .part('fuse', 'F7', 'study', { rating: 3, standard: 'gG', label: 'Spur' })
      .part('appliance', 'E7', 'study', { watts: 40, pf: 1, class: 2, fixed: true })
      .part('fuse', 'F8', 'study', { rating: 3, standard: 'gG', label: 'Spur' })
      .part('appliance', 'E8', 'study', { watts: 40, pf: 1, class: 2, fixed: true })
      .line('JL11', 'F7:1')
      .line('F7:2', 'E7:L')
      .neutral('JN11', 'E7:N')
      .line('JL11', 'F8:1')
      .line('F8:2', 'E8:L')
      .neutral('JN11', 'E8:N'),
    'ways behind rcbos': rcbo(rcbo(new Home().place('study').place('den'), 'Q71', 'study'), 'Q72', 'den'),
    'a neutral bar drawn as a joint in the board': new Home()
      .place('study')
      .place('den')
      .part('joint', 'JN', 'hall')
      .neutral('Q2:4', 'JN')
      .way('Q11', 'study')
      .lamp('E1', 'S1', 'Q11')
      .way('Q12', 'den')
      .lamp('E2', 'S2', 'Q12')
      .drop('NB')
      .neutral('JN', 'JN11', 'k11')
      .neutral('JN', 'JN12', 'k12'),
    'two cores of one way in two cables': twoWays()
      .cable('k99', 1.5, 9)
      .line('Q11:2', 'JL11', 'k99')
      .neutral('NB', 'JN11', 'k99')
      .earth('EB', 'JE11', 'k99'),
    'a neutral that goes round the rcd is an imbalance': {
      drawing: twoWays().move('NB', 'JN11', 'NB0'),
      also: ['residual-imbalance'],
    },
  },
  invalid: {
    'a lamp that returns by the core of another way, same rcd': {
      drawing: twoWays().lamp('E3', 'S3', 'Q11').move('JN11', 'E3', 'JN12'),
      findings: [{ parts: ['E3'], severity: 'danger' }],
    },
    'a lamp of a way that returns behind another rcd': {
      drawing: twoRcds().lamp('E3', 'S3', 'Q11').move('JN11', 'E3', 'JN61'),
      findings: [{ parts: ['E3'] }],
    },
    'a whole way on the bar of another rcd': {
      drawing: twoRcds().move('NB6', 'JN61', 'NB'),
      findings: [{ parts: ['E6'] }],
    },
    'between two rcbos': {
      drawing: rcbo(rcbo(new Home().place('study').place('den'), 'Q71', 'study'), 'Q72', 'den')
        .part('appliance', 'E7', 'den', { watts: 40, pf: 1, class: 2, fixed: true })
        .line('XQ71:L', 'E7:L')
        .neutral('XQ72:N', 'E7:N'),
      findings: [{ parts: ['E7'] }],
      also: ['missing-data'],
    },
    'the neutrals of two ways joined in a room': {
      drawing: twoWays().neutral('JN11', 'JN12'),
      findings: [{ parts: ['JN11', 'JN12'] }],
    },
    'the bars of two rcds joined': { drawing: twoRcds().neutral('NB', 'NB6'), findings: [{ parts: ['NB', 'NB6'] }] },
    'one neutral core for two ways': {
      drawing: twoWays().cut('NB', 'JN12').neutral('JN11', 'JN12'),
      findings: [{ parts: ['E2'] }],
    },
    'a landing lamp: line of one way, neutral of the other': {
      drawing: twoWays().twoWay('E9', 'S8', 'S9', 'Q11').move('JN11', 'E9', 'JN12'),
      findings: [{ parts: ['E9'] }],
    },
  },
});
