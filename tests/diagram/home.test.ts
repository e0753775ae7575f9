import { describe, expect, it } from 'vitest';
import { backupHome, Home, smallHome } from '@/diagram/document/home';
import { readDocument } from '@/diagram/document/schema';
import { findingsOf } from './rule-tester';

const homes = {
  'small home, TN-S': smallHome(),
  'small home, TN-C-S': smallHome({ supply: { system: 'TN-C-S' } }),
  'small home, TT': smallHome({ supply: { system: 'TT', ra: 40 } }),
  'home with backup': backupHome(),
  'home with backup, TT': backupHome({}, { supply: { system: 'TT', ra: 40 } }),
  'home with backup and separate neutral': backupHome({ neutral: 'separate' }),
  'home with everything': new Home()
    .place('study', 'room')
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .fan('M1', 'S2', 'R2', 'Q11')
    .socket('X1', 'Q11')
    .twoWay('E2', 'S3', 'S4', 'Q11')
    .way('Q12', 'study', { rating: 16 }, { csa: 2.5 })
    .heater('E3', 'S5', 'Q12'),
};

describe('drawn homes', () => {
  it.each(Object.entries(homes))('%s is a valid document without danger or defect', (_, home) => {
    const document = home.document();
    expect(readDocument(document)).toEqual({ ok: true, document });
    expect(findingsOf(document).filter(({ severity }) => severity !== 'advice')).toEqual([]);
  });
});
