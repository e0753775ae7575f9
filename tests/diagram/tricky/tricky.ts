import { backupHome, Home, type HomeOptions } from '@/diagram/document/home';
import type { Drawing } from '@/diagram/document/builder';

/** A drawing made to fool: a danger that looks right, or an installation that looks wrong and is right. */
export interface Tricky {
  drawing: Drawing;
  /** every danger and defect that must be found, by rule, one entry a finding; none where it is right as drawn */
  found: string[];
  /** parts and wires of which the first finding must name at least one */
  at?: string[];
  /** conditions of the first finding */
  conditions?: string[];
  /** advice that must be among what is said */
  advice?: string[];
}

/** Two rooms on two ways behind one rcd: study Q11 (lamp E1, outlet X1), den Q12 (lamp E2, outlet X2). */
export const twoRooms = (options: HomeOptions = {}): Home =>
  new Home(options)
    .place('study', 'room', { name: 'Study' })
    .place('den', 'room', { name: 'Den' })
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .socket('X1', 'Q11')
    .way('Q12', 'den')
    .lamp('E2', 'S2', 'Q12')
    .socket('X2', 'Q12');

/** A second rcd Q6 beside Q2, with bars LB3 and NB3. */
export const secondRcd = (home: Home): Home => {
  home
    .part('rcd', 'Q6', 'hall', { rating: 63, sensitivity: 0.03, type: 'A', delay: 'none' })
    .part('line-bar', 'LB3', 'hall', { rating: 63 })
    .part('neutral-bar', 'NB3', 'hall')
    .line('LB0', 'Q6:1')
    .neutral('NB0', 'Q6:3')
    .line('Q6:2', 'LB3')
    .neutral('Q6:4', 'NB3');
  return home;
};

/** Study on Q11 behind rcd Q2, den on Q12 behind rcd Q6. */
export const twoRcds = (): Home =>
  secondRcd(
    new Home().place('study', 'room', { name: 'Study' }).place('den', 'room', { name: 'Den' }).way('Q11', 'study'),
  )
    .lamp('E1', 'S1', 'Q11')
    .socket('X1', 'Q11')
    .way('Q12', 'den', {}, { bars: '3' })
    .lamp('E2', 'S2', 'Q12')
    .socket('X2', 'Q12');

/** A second inverter G3 with battery G4, output by Q7 and rcd Q8 on bars LB4 NB4, feeding a loft: way Q41, lamp E4 on S4. */
export const secondInverter = (home: Home): Home => {
  home
    .place('loft', 'room', { name: 'Loft' })
    .part('mcb', 'Q9', 'hall', { poles: 2, rating: 10, curve: 'C', icn: 6000, label: 'Second inverter' })
    .part('inverter', 'G3', 'hall', {
      va: 700,
      surge: 1400,
      charge: 20,
      efficiency: 0.85,
      transfer: 15,
      neutral: 'separate',
      bond: true,
      cutoff: 10.5,
      state: 'on',
    })
    .part('battery', 'G4', 'hall', { volts: 12, ah: 200, hours: 20, chemistry: 'vrla' })
    .part('fuse', 'F3', 'hall', { rating: 100, standard: 'dc' })
    .part('mcb', 'Q7', 'hall', { poles: 2, rating: 6, curve: 'C', icn: 6000, label: 'Second output' })
    .part('rcd', 'Q8', 'hall', { rating: 25, sensitivity: 0.03, type: 'A', delay: 'none' })
    .part('line-bar', 'LB4', 'hall', { rating: 25 })
    .part('neutral-bar', 'NB4', 'hall')
    .cable('ke', 35, 0.8)
    .line('LB0', 'Q9:1')
    .neutral('NB0', 'Q9:3')
    .line('Q9:2', 'G3:in.L')
    .neutral('Q9:4', 'G3:in.N')
    .earth('EB', 'G3:in.E')
    .wire('dc+', 'G4:+', 'F3:1', 'ke')
    .wire('dc+', 'F3:2', 'G3:bat.+', 'ke')
    .wire('dc-', 'G4:-', 'G3:bat.-', 'ke')
    .line('G3:out.L', 'Q7:1')
    .neutral('G3:out.N', 'Q7:3')
    .line('Q7:2', 'Q8:1')
    .neutral('Q7:4', 'Q8:3')
    .line('Q8:2', 'LB4')
    .neutral('Q8:4', 'NB4');
  return home.way('Q41', 'loft', {}, { bars: '4' }).lamp('E4', 'S4', 'Q41');
};

/** A changeover Q30 that feeds a pantry (way joints JL30 JN30 JE30, lamp E30 on S30) from mains way Q13 or backup way Q22. */
export const changeoverHome = (poles: 1 | 2, inverter: Parameters<typeof backupHome>[0] = {}): Home => {
  const home = backupHome(inverter)
    .place('pantry', 'room', { name: 'Pantry' })
    .part('mcb', 'Q13', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Pantry, mains' })
    .part('mcb', 'Q22', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'Pantry, backup' })
    .part('changeover', 'Q30', 'hall', { poles, rating: 20, state: 'A', label: 'Pantry' })
    .part('joint', 'JL30', 'pantry')
    .part('joint', 'JN30', 'pantry')
    .part('joint', 'JE30', 'pantry')
    .cable('k30', 1.5, 8)
    .line('LB', 'Q13:1')
    .line('LB2', 'Q22:1')
    .line('Q13:2', 'Q30:A1')
    .line('Q22:2', 'Q30:B1')
    .line('Q30:2', 'JL30', 'k30')
    .earth('EB', 'JE30', 'k30') as Home;
  if (poles === 2) home.neutral('NB', 'Q30:A3').neutral('NB2', 'Q30:B3').neutral('Q30:4', 'JN30', 'k30');
  return home.lamp('E30', 'S30', 'Q30');
};

/** A portable lead: plug `plug` in outlet `from`, at its other end outlet `to`. */
export const extension = (home: Drawing, plug: string, from: string | undefined, to: string, place: string): Drawing =>
  home
    .part('plug', plug, place, from === undefined ? {} : { in: from })
    .part('socket', to, place, { rating: 6, load: 40 })
    .cable(`c${plug}`, 1.5, 3)
    .line(`${plug}:L`, `${to}:L`, `c${plug}`)
    .neutral(`${plug}:N`, `${to}:N`, `c${plug}`)
    .earth(`${plug}:E`, `${to}:E`, `c${plug}`);
