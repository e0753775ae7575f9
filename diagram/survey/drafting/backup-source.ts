import { sizeCable, type CableSize } from '../../calculations/size-cable';
import { LENGTH, ratingFor } from './assumptions';
import type { BackupSize } from './backup-size';
import { BACKUP_BOARD, drawBars, drawGroup, type Pair } from './house';
import type { WayBars } from './draw-way';
import { drawFeed } from './feed';
import { HOUSE, groupIds } from './ids';
import { BEFORE_BACKUP } from './size-run';
import type { Sketch } from './sketch';

type CoreSize = Pick<CableSize, 'csaMm2' | 'cpcMm2'>;

function drawBattery(sketch: Sketch, size: BackupSize, place: string): void {
  const { draft } = sketch.practice;
  const { batteries, lead } = size;
  sketch.part({ id: HOUSE.battery, kind: 'battery', place, ...batteries });
  sketch.part({ id: HOUSE.batteryFuse, kind: 'fuse', place, rating: lead.fuseA, standard: 'dc' });
  const cable = (id: string, length: number) =>
    sketch.cable({
      id,
      csa: lead.csaMm2,
      material: draft.material,
      insulation: draft.insulation,
      method: 'C',
      length,
      cores: 1,
    });
  sketch.wire([HOUSE.battery, '+'], [HOUSE.batteryFuse, '1'], 'dc+', cable('battery-lead.fuse', LENGTH.batteryToFuse));
  sketch.wire(
    [HOUSE.batteryFuse, '2'],
    [HOUSE.inverter, 'bat.+'],
    'dc+',
    cable('battery-lead.plus', LENGTH.fuseToInverter),
  );
  sketch.wire(
    [HOUSE.battery, '-'],
    [HOUSE.inverter, 'bat.-'],
    'dc-',
    cable('battery-lead.minus', LENGTH.batteryToFuse + LENGTH.fuseToInverter),
  );
}

function drawInverter(sketch: Sketch, size: BackupSize, hours: number, place: string): void {
  sketch.part({
    id: HOUSE.inverter,
    kind: 'inverter',
    place,
    va: size.va,
    surge: size.surge,
    charge: size.charge,
    efficiency: size.efficiency,
    transfer: size.transfer,
    neutral: 'through',
    bond: true,
    cutoff: size.cutoff,
    state: 'on',
    ...(hours > 0 && { hoursWanted: hours }),
  });
}

interface Need {
  size: BackupSize;
  from: Pair;
  /** where the board stands */
  intake: string;
  hours: number;
  /** how many rcds the backed-up ways need */
  groups: number;
  icn: number;
  /** the main earth bar, where that is not the draft's own */
  earthBar?: string;
}

/**
 * The backup source: its feed from the board, inverter with its bond on battery, bank, dc fuse and leads; at its output a
 * two-pole breaker and the rcds of the backed-up ways, so that the runs to the backup board are behind them; the bars there.
 */
export function drawBackupSource(sketch: Sketch, need: Need): WayBars[] {
  const { size, intake, icn, earthBar = HOUSE.earthBar } = need;
  const { practice, supply } = sketch;
  const { draft } = practice;
  const place = sketch.place({ id: HOUSE.backupPlace, name: 'Backup source', kind: 'passage', ventilated: true });
  drawInverter(sketch, size, need.hours, place);
  drawFeed(sketch, { size, from: need.from, intake, icn, earthBar });
  drawBattery(sketch, size, place);
  const outputA = ratingFor(size.va / supply.voltage, practice.breakerRatingsA.value);
  sketch.part({
    id: HOUSE.output,
    kind: 'mcb',
    label: 'Backup output',
    place,
    poles: 2,
    rating: outputA,
    curve: 'C',
    icn,
  });

  const run = (id: string, runSize: CoreSize) =>
    sketch.cable({
      id,
      csa: runSize.csaMm2,
      cpc: runSize.cpcMm2,
      material: draft.material,
      insulation: draft.insulation,
      method: draft.method,
      length: LENGTH.boardToInverter,
      cores: 3,
    });
  sketch.wire([HOUSE.inverter, 'out.L'], [HOUSE.output, '1'], 'line');
  sketch.wire([HOUSE.inverter, 'out.N'], [HOUSE.output, '3'], 'neutral');

  const end: Pair = { line: [HOUSE.output, '2'], neutral: [HOUSE.output, '4'] };
  const taps =
    need.groups < 2
      ? () => end
      : drawBars(sketch, end, {
          line: HOUSE.outputLine,
          neutral: HOUSE.outputNeutral,
          place,
          board: 'Inverter',
          ratingA: outputA,
        });
  const outputSize = outputRun(sketch, size, outputA);
  return Array.from({ length: need.groups }, (_, i) => {
    const cable = run(`${groupIds('backup', i + 1).rcd}.run`, outputSize);
    if (i === 0) sketch.wire([HOUSE.inverter, 'out.E'], sketch.nextOn(earthBar), 'earth', cable);
    return drawGroup(sketch, taps(), {
      side: 'backup',
      n: i + 1,
      label: 'Backup ways',
      ratingA: outputA,
      icn,
      rcdPlace: place,
      rcdBoard: 'Inverter',
      place: intake,
      board: BACKUP_BOARD,
      earthBar,
      cable,
    });
  });
}

function outputRun(sketch: Sketch, size: BackupSize, ratingA: number): CoreSize {
  const { practice, supply, ambient } = sketch;
  const { draft } = practice;
  const found = sizeCable({
    practice,
    device: { kind: 'mcb', ratingA, curve: 'C' },
    ibA: size.load.va / supply.voltage,
    method: draft.method,
    material: draft.material,
    insulation: draft.insulation,
    ambientC: ambient,
    grouped: 1,
    lengthM: LENGTH.boardToInverter,
    voltage: supply.voltage,
    dropLimitPercent: BEFORE_BACKUP.output,
    leastMm2: 2.5,
  });
  if (!found)
    throw new RangeError(
      `no cable on sale carries ${ratingA} A over ${LENGTH.boardToInverter} m within ${BEFORE_BACKUP.output} %`,
    );
  return found;
}
