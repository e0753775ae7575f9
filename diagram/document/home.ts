import { Drawing, type DrawingOptions } from './builder';
import type { Part, PartOf } from './schema';

type Ratings<K extends Part['kind']> = K extends Part['kind'] ? Partial<Omit<PartOf<K>, 'id' | 'kind'>> : never;

/** Options of a drawn home. */
export interface HomeOptions extends DrawingOptions {
  /** false: no rcd before the bar LB */
  rcd?: boolean | Ratings<'rcd'>;
}

/**
 * A home that is right as drawn: service, meter, main switch Q1, bars LB0 NB0, rcd Q2 with its bars LB NB, earth bar EB.
 * Ways, points and a backup source are added by name; joints of a way are JL, JN and JE with its number.
 */
export class Home extends Drawing {
  constructor(options: HomeOptions = {}) {
    super(options);
    const tt = options.supply?.system === 'TT';
    this.place('hall', 'intake', { name: 'Hall' })
      .part('supply', 'SUP', 'hall')
      .part('fuse', 'F1', 'hall', { rating: 63, standard: 'gG' })
      .part('meter', 'P1', 'hall', { rating: 80 })
      .part('isolator', 'Q1', 'hall', { poles: 2, rating: 63, label: 'Main switch' })
      .part('line-bar', 'LB0', 'hall', { rating: 63 })
      .part('neutral-bar', 'NB0', 'hall')
      .part('line-bar', 'LB', 'hall', { rating: 63 })
      .part('neutral-bar', 'NB', 'hall')
      .part('earth-bar', 'EB', 'hall')
      .part('spd', 'F9', 'hall', { class: 2 })
      .line('SUP:L', 'F1:1')
      .line('F1:2', 'P1:1')
      .neutral('SUP:N', 'P1:2')
      .line('P1:4', 'Q1:1')
      .neutral('P1:3', 'Q1:3')
      .line('LB0', 'F9:L')
      .neutral('NB0', 'F9:N')
      .earth('F9:E', 'EB');
    // On TT nothing but an rcd clears a fault to earth, so one stands before everything.
    if (tt)
      this.part('electrode', 'XE', 'hall')
        .earth('XE:E', 'EB')
        .part('rcd', 'Q0', 'hall', { rating: 63, sensitivity: 0.3, type: 'A', delay: 'S' })
        .line('Q1:2', 'Q0:1')
        .neutral('Q1:4', 'Q0:3')
        .line('Q0:2', 'LB0')
        .neutral('Q0:4', 'NB0');
    else this.earth('SUP:E', 'EB').line('Q1:2', 'LB0').neutral('Q1:4', 'NB0');
    if (options.rcd === false) this.line('LB0', 'LB').neutral('NB0', 'NB');
    else {
      const ratings = {
        rating: 63,
        sensitivity: 0.03,
        type: 'A',
        delay: 'none',
        ...(typeof options.rcd === 'object' && options.rcd),
      } as const;
      this.part('rcd', 'Q2', 'hall', ratings)
        .line('LB0', 'Q2:1')
        .neutral('NB0', 'Q2:3')
        .line('Q2:2', 'LB')
        .neutral('Q2:4', 'NB');
    }
  }

  /** A way from an mcb to the joints of a room: `way('Q11', 'study')` draws Q11, cable k11 and JL11, JN11, JE11. */
  way(
    id: string,
    place: string,
    ratings: Ratings<'mcb'> = {},
    from: { bars?: string; csa?: number; length?: number } = {},
  ): this {
    const n = id.replace(/\D/g, '');
    const { bars = '', csa = 1.5, length = 9 } = from;
    return this.part('mcb', id, 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: `Way ${n}`, ...ratings })
      .part('joint', `JL${n}`, place)
      .part('joint', `JN${n}`, place)
      .part('joint', `JE${n}`, place)
      .cable(`k${n}`, csa, length)
      .line(`LB${bars}`, `${id}:1`)
      .line(`${id}:2`, `JL${n}`, `k${n}`)
      .neutral(`NB${bars}`, `JN${n}`, `k${n}`)
      .earth('EB', `JE${n}`, `k${n}`);
  }

  /** A lamp and its switch on a way; class 1 unless said otherwise. */
  lamp(id: string, sw: string, way: string, ratings: Ratings<'lamp'> = {}): this {
    const { place, n } = this.at(way);
    this.part('switch', sw, place, { rating: 6 })
      .part('lamp', id, place, { watts: 12, pf: 0.9, class: 1, fixed: true, ...ratings })
      .cable(`c${id}`, 1.5, 5)
      .line(`JL${n}`, `${sw}:1`)
      .switched(`${sw}:2`, `${id}:L`, `c${id}`)
      .neutral(`JN${n}`, `${id}:N`, `c${id}`);
    return ratings.class === 2 ? this : this.earth(`JE${n}`, `${id}:E`, `c${id}`);
  }

  /** A fan with its switch and regulator on a way. */
  fan(id: string, sw: string, regulator: string, way: string, ratings: Ratings<'fan'> = {}): this {
    const { place, n } = this.at(way);
    return this.part('switch', sw, place, { rating: 6 })
      .part('regulator', regulator, place, { rating: 2 })
      .part('fan', id, place, { watts: 50, pf: 0.9, surge: 2, class: 1, fixed: true, ...ratings })
      .cable(`c${id}`, 1.5, 5)
      .line(`JL${n}`, `${sw}:1`)
      .switched(`${sw}:2`, `${regulator}:1`)
      .switched(`${regulator}:2`, `${id}:L`, `c${id}`)
      .neutral(`JN${n}`, `${id}:N`, `c${id}`)
      .earth(`JE${n}`, `${id}:E`, `c${id}`);
  }

  socket(id: string, way: string, ratings: Ratings<'socket'> = {}): this {
    const { place, n } = this.at(way);
    return this.part('socket', id, place, { rating: 6, load: 100, ...ratings })
      .line(`JL${n}`, `${id}:L`)
      .neutral(`JN${n}`, `${id}:N`)
      .earth(`JE${n}`, `${id}:E`);
  }

  /** A fixed appliance behind a two-pole switch. */
  heater(id: string, sw: string, way: string, ratings: Ratings<'appliance'> = {}): this {
    const { place, n } = this.at(way);
    return this.part('switch-2pole', sw, place, { rating: 20 })
      .part('appliance', id, place, { watts: 1000, pf: 1, surge: 1, class: 1, fixed: true, ...ratings })
      .cable(`c${id}`, 1.5, 1)
      .line(`JL${n}`, `${sw}:1`)
      .neutral(`JN${n}`, `${sw}:3`)
      .switched(`${sw}:2`, `${id}:L`, `c${id}`)
      .neutral(`${sw}:4`, `${id}:N`, `c${id}`)
      .earth(`JE${n}`, `${id}:E`, `c${id}`);
  }

  /** A lamp worked from two places of the same way. */
  twoWay(id: string, first: string, second: string, way: string): this {
    const { place, n } = this.at(way);
    return this.part('switch-2way', first, place, { rating: 6 })
      .part('switch-2way', second, place, { rating: 6 })
      .part('lamp', id, place, { watts: 12, pf: 0.9, class: 1, fixed: true })
      .cable(`c${id}`, 1.5, 7, { cores: 6 })
      .line(`JL${n}`, `${first}:C`, `c${id}`)
      .wire('strapper', `${first}:1`, `${second}:1`, `c${id}`)
      .wire('strapper', `${first}:2`, `${second}:2`, `c${id}`)
      .switched(`${second}:C`, `${id}:L`, `c${id}`)
      .neutral(`JN${n}`, `${id}:N`, `c${id}`)
      .earth(`JE${n}`, `${id}:E`, `c${id}`);
  }

  /** An inverter G1 with battery G2 behind mcb Q3; its output by mcb Q4 and rcd Q5 on bars LB2 NB2. */
  backup(ratings: Ratings<'inverter'> = {}): this {
    return this.part('mcb', 'Q3', 'hall', { poles: 2, rating: 10, curve: 'C', icn: 6000, label: 'Inverter' })
      .part('inverter', 'G1', 'hall', {
        va: 700,
        surge: 1400,
        charge: 20,
        efficiency: 0.85,
        transfer: 15,
        neutral: 'through',
        bond: true,
        cutoff: 10.5,
        state: 'on',
        ...ratings,
      })
      .part('battery', 'G2', 'hall', { volts: 12, ah: 200, hours: 20, chemistry: 'vrla' })
      .part('fuse', 'F2', 'hall', { rating: 100, standard: 'dc' })
      .part('mcb', 'Q4', 'hall', { poles: 2, rating: 6, curve: 'C', icn: 6000, label: 'Backup output' })
      .part('rcd', 'Q5', 'hall', { rating: 25, sensitivity: 0.03, type: 'A', delay: 'none' })
      .part('line-bar', 'LB2', 'hall', { rating: 25 })
      .part('neutral-bar', 'NB2', 'hall')
      .cable('kd', 35, 0.8)
      .line('LB0', 'Q3:1')
      .neutral('NB0', 'Q3:3')
      .line('Q3:2', 'G1:in.L')
      .neutral('Q3:4', 'G1:in.N')
      .earth('EB', 'G1:in.E')
      .wire('dc+', 'G2:+', 'F2:1', 'kd')
      .wire('dc+', 'F2:2', 'G1:bat.+', 'kd')
      .wire('dc-', 'G2:-', 'G1:bat.-', 'kd')
      .line('G1:out.L', 'Q4:1')
      .neutral('G1:out.N', 'Q4:3')
      .line('Q4:2', 'Q5:1')
      .neutral('Q4:4', 'Q5:3')
      .line('Q5:2', 'LB2')
      .neutral('Q5:4', 'NB2')
      .notice('hall', 'Two sources: isolate the mains and the backup.');
  }

  private at(way: string): { place: string | undefined; n: string } {
    const n = way.replace(/\D/g, '');
    return { place: this.placeOf(`JL${n}`), n };
  }
}

/** A home of one study on way Q11: lamp E1 on switch S1, outlet X1. */
export const smallHome = (options: HomeOptions = {}): Home =>
  new Home(options)
    .place('study', 'room', { name: 'Study' })
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .socket('X1', 'Q11');

/** The small home with a backup source and a bedroom on it: way Q21, lamp E2 on switch S2, outlet X2. */
export const backupHome = (ratings: Ratings<'inverter'> = {}, options: HomeOptions = {}): Home =>
  smallHome(options)
    .backup(ratings)
    .place('bedroom', 'room', { name: 'Bedroom' })
    .way('Q21', 'bedroom', {}, { bars: '2' })
    .lamp('E2', 'S2', 'Q21')
    .socket('X2', 'Q21');
