import { describe, expect, it } from 'vitest';
import { backupHome, smallHome } from '@/diagram/document/home';
import { examine } from '@/diagram/rules/examine';
import { compareFindings } from '@/diagram/rules/run';

const rulesOf = (document: Parameters<typeof examine>[0], practice?: Parameters<typeof examine>[1]) =>
  examine(document, practice).findings.map(({ rule }) => rule);

describe('examine', () => {
  it('answers for ways, supply, backup and loads, not for findings alone', () => {
    const { ways, supply, backup, loads, schema, title } = examine(backupHome().document());
    expect({ schema, title }).toEqual({ schema: 1, title: 'A drawing' });
    expect(ways.map(({ part }) => part)).toEqual(['Q3', 'Q11', 'Q21']);
    expect(supply.conditions).toEqual(['mains', 'outage', 'main-off']);
    expect(supply.ipf).toBeCloseTo(230 / 0.3, 3);
    expect(backup.map(({ inverter }) => inverter)).toEqual(['G1']);
    expect(loads.map(({ part }) => part).sort()).toEqual(['E1', 'E2', 'X1', 'X2']);
    const lamp = loads.find(({ part }) => part === 'E2')!.conditions;
    expect(lamp.outage).toMatchObject({ fed: true, from: 'G1', overcurrent: 'Q21', rcd: 'Q5' });
    expect(loads.find(({ part }) => part === 'E1')!.conditions.outage).toMatchObject({
      fed: false,
      from: null,
      overcurrent: null,
      rcd: null,
    });
  });

  it('says what is fed as it is drawn, a feedback too', () => {
    const home = backupHome().line('JL11', 'JL21').document();
    expect(examine(home).loads.find(({ part }) => part === 'E1')!.conditions.outage).toMatchObject({ from: 'G1' });
  });

  it('puts dangers first, then defects, then advice, each in one order', () => {
    const { findings } = examine(
      backupHome().line('JL11', 'JN11').cut('JN21', 'E2').set('S1', { ref: 'X1' }).document(),
    );
    expect(new Set(findings.map(({ severity }) => severity)).size).toBe(3);
    expect([...findings].sort(compareFindings)).toEqual(findings);
  });

  it('judges by another practice when asked', () => {
    const lampsOnly = smallHome({ rcd: false }).drop('X1').document();
    expect(rulesOf(lampsOnly)).not.toContain('no-rcd');
    expect(rulesOf(lampsOnly, 'GB')).toContain('no-rcd');
  });
});

describe('a silenced finding', () => {
  const drawing = () => smallHome().line('S1:1', 'S1:2');

  it('stays in the list, with the reason and the name', () => {
    const [finding] = examine(
      drawing().silence('bypassed-contact', 'S1', 'kept for the old clock', 'T. B.').document(),
    ).findings;
    expect(finding).toMatchObject({
      rule: 'bypassed-contact',
      silenced: { reason: 'kept for the old clock', by: 'T. B.' },
    });
  });

  it('is not silenced by an answer to another rule or at another part', () => {
    const home = drawing().silence('open-line', 'S1').silence('bypassed-contact', 'E1').document();
    expect(examine(home).findings[0]).not.toHaveProperty('silenced');
  });

  it('can be named by its wire', () => {
    const home = drawing();
    const wire = home.wireBetween('S1:1', 'S1:2');
    expect(examine(home.silence('bypassed-contact', wire).document()).findings[0]).toHaveProperty('silenced');
  });
});
