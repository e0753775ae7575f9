import { describe, expect, it } from 'vitest';
import { examine } from '@/diagram/rules/examine';
import { findWays } from '@/diagram/terminals/ways';
import { draftDocument } from '@/diagram/survey/draft';
import { surveyTotals } from '@/diagram/survey/totals';
import { optionsOf, room, sixRooms } from './surveys';

const options = optionsOf('IEC', 'TT', 4);

describe('the sums of a survey', () => {
  it('adds each row by hand: lamps, fans, 100 W an outlet, the kept outlet, heavy appliances', () => {
    const { rooms } = surveyTotals(sixRooms(), options);
    expect(rooms.map(({ watts }) => watts)).toEqual([18, 382, 3324, 2114, 433, 273]);
    expect(rooms[1]!.amps).toBeCloseTo(382 / 230, 9);
    expect(rooms.map(({ backupWatts }) => backupWatts)).toEqual([9, 64, 12, 7, 124, 64]);
    // 9 W and 55 W at a power factor of 0.9, 60 W at 1
    expect(rooms[4]!.backupVa).toBeCloseTo(64 / 0.9 + 60, 9);
  });

  it('adds the home, and leaves out of it a row with an error', () => {
    const totals = surveyTotals(sixRooms(), options);
    expect([
      totals.lamps,
      totals.fans,
      totals.outlets,
      totals.heavy,
      totals.keepLamps,
      totals.keepFans,
      totals.keepOutletWatts,
      totals.watts,
    ]).toEqual([13, 3, 12, 2, 6, 3, 60, 6544]);
    const wrong = sixRooms().map((row) => (row.name === 'Kitchen' ? { ...row, keepLamps: 3 } : row));
    const without = surveyTotals(wrong, options);
    expect(without.watts).toBe(6544 - 3324);
    expect(without.rooms[2]).toMatchObject({ waits: true, ways: [] });
  });

  it('gives the demand line by line', () => {
    const { demandLines, demandAmps } = surveyTotals(sixRooms(), options);
    const amps = Object.fromEntries(demandLines.map(({ group, demandA }) => [group, demandA]));
    // 66 % of 284 W at 0.9; cooker 10 A and 30 % of the rest; heater whole up to 10 A: Whitfield Table 6.2
    expect(amps.lighting).toBeCloseTo((0.66 * 284) / 207, 6);
    expect(amps.cooker).toBeCloseTo(10 + 0.3 * (3000 / 230 - 10), 6);
    expect(amps['heating-power']).toBeCloseTo(2000 / 230, 6);
    // the largest way of outlets whole, 40 % of the others: 300 W, then 300, 300, 200, 100 and the kept 60
    expect(amps.sockets).toBeCloseTo((300 + 0.4 * (300 + 300 + 200 + 100 + 60)) / 230, 6);
    expect(demandAmps).toBeCloseTo(
      Object.values(amps).reduce((sum, value) => sum + value, 0),
      9,
    );
  });

  it('asks for the same as the drafted sheet does', () => {
    for (const practice of ['IEC', 'IN', 'GB'] as const) {
      const of = optionsOf(practice, 'TN-S', 4);
      const totals = surveyTotals(sixRooms(), of);
      const examined = examine(draftDocument(sixRooms(), of));
      expect(examined.supply.demandAmps).toBeCloseTo(totals.demandAmps, 5);
      expect(examined.supply.demandWatts).toBeCloseTo(totals.demandWatts, 4);
      expect(examined.backup[0]!.autonomyHours).toBeCloseTo(totals.backup!.hours, 5);
      expect(examined.backup[0]!.watts).toBe(totals.backup!.watts);
      expect(examined.ways).toHaveLength(totals.ways + 1);
    }
  });

  it('sizes the backup for the longest wish', () => {
    const { backup } = surveyTotals(sixRooms(), options);
    expect(backup).toMatchObject({ watts: 280, inverterVa: 600, hoursWanted: 4 });
    expect(backup!.hours).toBeGreaterThanOrEqual(4);
    expect(surveyTotals([room('A', { lamps: 2 })], options).backup).toBeNull();
  });

  it('numbers the ways of a row as the drafted sheet does', () => {
    const rooms = sixRooms();
    const ways = findWays(draftDocument(rooms, options));
    for (const row of surveyTotals(rooms, options).rooms) {
      const drawn = ways
        .filter(({ places }) => places.some((place) => place === row.room || place === `${row.room}.dry`))
        .map(({ number }) => number);
      expect(row.ways, row.room).toEqual(drawn);
    }
  });
});
