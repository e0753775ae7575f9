import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { priced, takeOff } from '@/diagram/calculations/take-off';
import { readDocument } from '@/diagram/document/schema';
import { practices } from '@/diagram/practices';

const read = readDocument(
  JSON.parse(readFileSync(new URL('../../fixtures/homes/clean-flat.json', import.meta.url), 'utf8')),
);
if (!read.ok) throw new Error('the fixture is not a document');
const flat = read.document;

describe('take-off of a small flat', () => {
  const lines = takeOff(flat, practices.IEC, 0);
  const quantity = (what: string) => lines.find((line) => line.what === what)?.quantity;
  test('metres of core by size and colour, added by hand', () => {
    // The run k1 9 m, cE1 5 m switched, cE2 7 m line and 7 m switched: switched cores are brown here, too.
    expect(quantity('core 1.5 mm2 BN')).toBe(9 + 5 + 7 + 7);
    expect(quantity('core 1.5 mm2 BU')).toBe(9 + 5 + 7);
    expect(quantity('core 1.5 mm2 GNYE')).toBe(9 + 5);
    expect(quantity('core 2.5 mm2 BU')).toBe(11);
    expect(quantity('core 4 mm2 BN')).toBe(13 + 1.5);
    expect(quantity('core 10 mm2 GNYE')).toBe(4);
  });
  test('conduit where the method asks for it, none for a clipped cable', () => {
    expect(quantity('conduit or trunking, method B1')).toBe(5 + 7);
    expect(lines.some((line) => line.what.includes('method C'))).toBe(false);
  });
  test('devices and accessories by the piece; supply and meter are not bought', () => {
    expect(quantity('mcb 1-pole type B 6 A')).toBe(1);
    expect(quantity('outlet 10 A')).toBe(2);
    expect(quantity('rcd 63 A 30 mA')).toBe(1);
    expect(lines.some((line) => /supply|meter/.test(line.what))).toBe(false);
  });
  test('wastage lengthens every run and nothing else', () => {
    const more = takeOff(flat, practices.IEC, 0.1);
    more.forEach((line, i) => expect(line.quantity).toBeCloseTo(lines[i]!.quantity * (line.unit === 'm' ? 1.1 : 1), 9));
  });
  test('prices, what has none, and tax as entered', () => {
    const offer = priced(lines, { 'core 2.5 mm2 BU': 2, 'outlet 10 A': 5 }, 0.2);
    expect(offer.net).toBe(11 * 2 + 2 * 5);
    expect(offer.total).toBeCloseTo(32 * 1.2, 12);
    expect(offer.unpriced).not.toContain('outlet 10 A');
    expect(offer.unpriced).toContain('core 1.5 mm2 BN');
  });
  test('refuses wastage, taxShare and a price by name', () => {
    expect(() => takeOff(flat, practices.IEC, -1)).toThrow(/^wastage is/);
    expect(() => priced(lines, {}, NaN)).toThrow(/^taxShare is/);
    expect(() => priced(lines, { 'outlet 10 A': -1 }, 0)).toThrow(/^prices\.outlet 10 A is/);
  });
});
