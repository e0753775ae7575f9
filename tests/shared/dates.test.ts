import { describe, expect, it } from 'vitest';
import { addDays, daysBetween, shortDate } from '@/lib/shared/dates';

describe('calendar days', () => {
  it('counts across months, leap days and the change of summer time', () => {
    expect(daysBetween('2026-11-28', '2026-12-02')).toBe(4);
    expect(daysBetween('2028-02-28', '2028-03-01')).toBe(2);
    expect(daysBetween('2026-03-28', '2026-03-30')).toBe(2);
    expect(daysBetween('2026-12-02', '2026-11-28')).toBe(-4);
  });

  it('adds days', () => {
    expect(addDays('2026-12-30', 3)).toBe('2027-01-02');
    expect(addDays('2028-03-01', -1)).toBe('2028-02-29');
  });

  it('names the year only where it is another', () => {
    expect(shortDate('2026-12-02', '2026-11-30')).toBe('2 Dec');
    expect(shortDate('2027-01-02T10:00:00.000Z', '2026-11-30')).toBe('2 Jan 2027');
  });
});
