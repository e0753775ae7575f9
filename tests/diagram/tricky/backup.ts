import { backupHome } from '@/diagram/document/home';
import { changeoverHome, extension, secondInverter, type Tricky } from './tricky';

/** A second source: inverters, batteries, changeovers, plugs. */
export const BACKUP: Record<string, Tricky> = {
  'two inverters, each with its own rooms': { drawing: secondInverter(backupHome()), found: [] },
  'two inverters with their outputs joined': {
    drawing: secondInverter(backupHome()).line('LB2', 'LB4').neutral('NB2', 'NB4'),
    found: ['mixed-feeds', 'borrowed-neutral'],
    at: ['LB2', 'LB4'],
  },
  'an inverter with separate neutral and its bonding relay': {
    drawing: backupHome({ neutral: 'separate', bond: true }),
    found: [],
  },
  'an inverter with separate neutral and no bond: floating as soon as the mains fail': {
    drawing: backupHome({ neutral: 'separate', bond: false }),
    found: ['no-earth-reference-on-backup'],
    conditions: ['outage', 'main-off'],
  },
  'a changeover of two poles': { drawing: changeoverHome(2), found: [] },
  'a changeover of one pole, the neutral left on the mains bar': {
    drawing: changeoverHome(1).neutral('NB', 'JN30', 'k30'),
    found: ['backup-neutral-lost'],
    at: ['E30'],
    conditions: ['outage/B', 'main-off/B'],
  },
  'a changeover of one pole before TN-C-S, the inverter with its neutral separate': {
    drawing: changeoverHome(1, { neutral: 'separate' }).neutral('NB', 'JN30', 'k30'),
    found: ['backup-neutral-lost'],
    at: ['E30'],
  },
  'a changeover with the two neutrals changed over': {
    drawing: changeoverHome(2).move('Q30:A3', 'NB', 'Q30:B3').move('Q30:B3', 'NB2', 'Q30:A3'),
    found: ['backup-neutral-lost'],
    at: ['Q30', 'E30'],
  },
  'a changeover wired backwards: the room at A, the mains at the common': {
    drawing: changeoverHome(2)
      .move('Q30:A1', 'Q13:2', 'Q30:2')
      .move('Q30:2', 'JL30', 'Q30:A1')
      .move('Q30:A3', 'NB', 'Q30:4')
      .move('Q30:4', 'JN30', 'Q30:A3'),
    found: ['mixed-feeds', 'backfeed'],
    at: ['Q30'],
  },
  'a lamp between the lines of mains and backup: dark always, its terminals live': {
    drawing: backupHome()
      .part('lamp', 'E9', 'study', { watts: 12, pf: 0.9, class: 2, fixed: true })
      .line('JL11', 'E9:L')
      .line('JL21', 'E9:N'),
    found: ['mixed-feeds'],
    at: ['E9'],
  },
  'the output of the inverter led by a plug into an outlet of the mains': {
    drawing: backupHome()
      .part('plug', 'PL9', 'study', { in: 'X1' })
      .cable('k9', 1.5, 9)
      .line('Q4:2', 'PL9:L', 'k9')
      .neutral('Q4:4', 'PL9:N', 'k9')
      .earth('EB', 'PL9:E', 'k9'),
    found: ['backfeed', 'live-pins'],
    at: ['PL9'],
  },
  'the same lead, not plugged in': {
    drawing: backupHome()
      .part('plug', 'PL9', 'study')
      .cable('k9', 1.5, 9)
      .line('Q4:2', 'PL9:L', 'k9')
      .neutral('Q4:4', 'PL9:N', 'k9')
      .earth('EB', 'PL9:E', 'k9'),
    found: ['live-pins'],
    at: ['PL9'],
  },
  'a tie switch between the mains bar and the backup bar': {
    drawing: backupHome().part('switch', 'S99', 'hall', { rating: 20 }).line('LB', 'S99:1').line('LB2', 'S99:2'),
    found: ['mixed-feeds', 'backfeed'],
  },
  'the battery the wrong way round': {
    drawing: backupHome()
      .move('G2:+', 'F2:1', 'G2:-')
      .move('G2:-', 'G1:bat.-', 'G2:+'),
    found: ['battery-reversed'],
    at: ['G2'],
  },
  'the battery fuse in the minus lead': {
    drawing: backupHome()
      .cut('G2:+', 'F2')
      .cut('F2', 'G1')
      .cut('G2:-', 'G1:bat.-')
      .wire('dc+', 'G2:+', 'G1:bat.+', 'kd')
      .wire('dc-', 'G2:-', 'F2:1', 'kd')
      .wire('dc-', 'F2:2', 'G1:bat.-', 'kd'),
    found: ['no-battery-fuse'],
    at: ['G2', 'F2', 'G1'],
  },
  'two batteries of 12 V in series on a bank of 24 V': {
    drawing: backupHome({ cutoff: 21 })
      .part('battery', 'G5', 'hall', { volts: 12, ah: 200, hours: 20, chemistry: 'vrla' })
      .cut('G2:-', 'G1:bat.-')
      .wire('dc-', 'G2:-', 'G5:+', 'kd')
      .wire('dc-', 'G5:-', 'G1:bat.-', 'kd'),
    found: [],
  },
  'one of two batteries in series turned round': {
    drawing: backupHome({ cutoff: 21 })
      .part('battery', 'G5', 'hall', { volts: 12, ah: 200, hours: 20, chemistry: 'vrla' })
      .cut('G2:-', 'G1:bat.-')
      .wire('dc-', 'G2:-', 'G5:-', 'kd')
      .wire('dc-', 'G5:+', 'G1:bat.-', 'kd'),
    found: ['battery-reversed'],
    at: ['G5'],
  },
  'an inverter that stands off: its rooms are on its bypass': { drawing: backupHome({ state: 'off' }), found: [] },
  'an inverter fed from before the main switch': {
    drawing: backupHome().cut('LB0', 'Q3').cut('NB0', 'Q3').line('P1:4', 'Q3:1').neutral('P1:3', 'Q3:3'),
    found: ['no-main-switch'],
  },
  'a backed-up outlet takes its neutral from before its rcd': {
    drawing: backupHome().move('NB2', 'JN21', 'Q5:3'),
    found: ['backup-neutral-behind-other-rcd'],
    at: ['Q5'],
  },
  'a portable inverter on a plug, a portable lead at its output': {
    drawing: extension(portable(), 'PL2', 'X5', 'X6', 'study'),
    found: [],
  },
  'a portable inverter on a plug that feeds a room: pulled, the room has no earth': {
    drawing: portable()
      .part('lamp', 'E5', 'study', { watts: 10, pf: 0.9, class: 1, fixed: true })
      .part('switch', 'S5', 'study', { rating: 6 })
      .line('X5:L', 'S5:1')
      .switched('S5:2', 'E5:L')
      .neutral('X5:N', 'E5:N')
      .earth('X5:E', 'E5:E'),
    found: ['switched-earth'],
    at: ['PL1'],
  },
  'the same room with its earth from the way': {
    drawing: portable()
      .part('lamp', 'E5', 'study', { watts: 10, pf: 0.9, class: 1, fixed: true })
      .part('switch', 'S5', 'study', { rating: 6 })
      .line('X5:L', 'S5:1')
      .switched('S5:2', 'E5:L')
      .neutral('X5:N', 'E5:N')
      .earth('JE11', 'E5:E')
      .earth('EB', 'G1:in.E'),
    found: [],
  },
  'an inverter on a plug whose rooms return by the mains bar': {
    drawing: backupHome({ bond: false })
      .part('plug', 'PL1', 'study', { in: 'X1' })
      .cut('LB0', 'Q3')
      .cut('NB0', 'Q3')
      .drop('Q3')
      .line('PL1:L', 'G1:in.L')
      .neutral('PL1:N', 'G1:in.N')
      .move('NB2', 'JN21', 'NB'),
    found: ['backup-neutral-lost', 'live-pins', 'no-earth-reference-on-backup'],
  },
};

/** The study's outlet X1 with a small inverter on a plug PL1; at its output an rcbo Q6 and an outlet X5 for one lead. */
function portable() {
  return backupHome()
    .drop('G1')
    .drop('G2')
    .drop('F2')
    .drop('Q3')
    .drop('Q4')
    .drop('Q5')
    .drop('LB2')
    .drop('NB2')
    .drop('Q21')
    .drop('JL21')
    .drop('JN21')
    .drop('JE21')
    .drop('S2')
    .drop('E2')
    .drop('X2')
    .part('plug', 'PL1', 'study', { in: 'X1' })
    .part('inverter', 'G1', 'study', {
      va: 300,
      surge: 600,
      charge: 10,
      efficiency: 0.85,
      neutral: 'through',
      bond: true,
      cutoff: 10.5,
      state: 'on',
    })
    .part('battery', 'G2', 'study', { volts: 12, ah: 100, hours: 20, chemistry: 'vrla' })
    .part('fuse', 'F2', 'study', { rating: 50, standard: 'dc' })
    .part('rcbo', 'Q6', 'study', {
      poles: 2,
      rating: 6,
      curve: 'B',
      icn: 6000,
      sensitivity: 0.03,
      type: 'A',
      delay: 'none',
      label: 'Output',
    })
    .part('socket', 'X5', 'study', { rating: 6, load: 60 })
    .cable('kd', 16, 0.5)
    .line('PL1:L', 'G1:in.L')
    .neutral('PL1:N', 'G1:in.N')
    .earth('PL1:E', 'G1:in.E')
    .wire('dc+', 'G2:+', 'F2:1', 'kd')
    .wire('dc+', 'F2:2', 'G1:bat.+', 'kd')
    .wire('dc-', 'G2:-', 'G1:bat.-', 'kd')
    .line('G1:out.L', 'Q6:1')
    .neutral('G1:out.N', 'Q6:3')
    .line('Q6:2', 'X5:L')
    .neutral('Q6:4', 'X5:N')
    .earth('G1:out.E', 'X5:E');
}
