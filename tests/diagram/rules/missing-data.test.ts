import { describe, expect, it } from 'vitest';
import { smallHome } from '@/diagram/document/home';
import { missingData } from '@/diagram/rules/missing-data';
import { findingsOf, testRule } from '../rule-tester';

testRule(missingData, {
  valid: { 'everything stated': smallHome(), 'a wire without cable inside the board': smallHome() },
  invalid: {
    'the sensitivity of an rcd': {
      drawing: smallHome().set('Q2', { sensitivity: undefined }),
      findings: [{ parts: ['Q2'], severity: 'advice', message: /no-rcd/ }],
    },
    'the class of a lamp without earth wire': {
      drawing: smallHome().cut('JE11', 'E1').set('E1', { class: undefined }),
      findings: [{ parts: ['E1'], message: /missing-earth/ }],
    },
  },
});

describe('missing-data', () => {
  it('names one lack once, with all the rules that wait for it', () => {
    const found = findingsOf(smallHome().set('Q11', { rating: undefined }).document()).filter(
      ({ rule }) => rule === 'missing-data',
    );
    expect(found).toHaveLength(1);
    expect(found[0]!.parts).toEqual(['Q11']);
    expect(found[0]!.message).toMatch(/overloaded-way.*undersized-cable|undersized-cable.*overloaded-way/);
  });
});
