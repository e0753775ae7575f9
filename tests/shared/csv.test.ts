import { describe, expect, it } from 'vitest';
import { csvText } from '@/lib/shared/csv';

const lines = (rows: Parameters<typeof csvText>[0]) => csvText(rows).replace('\ufeff', '').split('\r\n').slice(0, -1);

describe('csv', () => {
  it('begins with a byte order mark and ends each row as RFC 4180 has it', () => {
    expect(csvText([['a', 1], ['b', null]])).toBe('\ufeffa,1\r\nb,\r\n');
  });

  it('quotes what would break a row', () => {
    expect(lines([['Orrin, M.', 'the "old" mill', 'two\nlines']])).toEqual(['"Orrin, M.","the ""old"" mill","two\nlines"']);
  });

  it.each(['=1+1', '+1+1', '-1+1', '@sum', '\tx', '=HYPERLINK("http://elsewhere.example")'])('shows %j as text', (typed) => {
    expect(lines([[typed]])[0]).toMatch(/^"?'/);
  });

  it('leaves a negative number a number', () => {
    expect(lines([['-12.5', -3]])).toEqual(['-12.5,-3']);
  });
});
