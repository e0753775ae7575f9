import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { backupHome, smallHome } from '@/diagram/document/home';
import { walkFaults } from '@/diagram/circuit/fault-walk';
import type { FaultWalk } from '@/diagram/circuit/fault-types';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { buildContext } from '@/diagram/rules/context';
import { rules } from '@/diagram/rules/index';
import { runRules } from '@/diagram/rules/run';
import { showFault } from '@/diagram/rules/show-fault';

const fixture = (name: string): Installation => {
  const read = readDocument(
    JSON.parse(readFileSync(new URL(`../fixtures/homes/${name}.json`, import.meta.url), 'utf8')),
  );
  if (!read.ok) throw new Error(`${name} is not a document`);
  return read.document;
};

function shown(doc: Installation, rule: string): FaultWalk {
  const context = buildContext(doc);
  const finding = runRules(context, rules).find((each) => each.rule === rule);
  if (!finding) throw new Error(`no finding ${rule}`);
  const show = showFault(context, finding);
  if (!show) throw new Error(`${rule} is not shown`);
  return walkFaults(context.graph, context.evaluation, show.faults, show.condition);
}

describe('a danger is shown by the fault that proves it', () => {
  test('missing-earth: the case stands at the line and nothing opens', () => {
    const walk = shown(fixture('missing-earth'), 'missing-earth');
    expect(walk.touchVolts).toBeGreaterThan(200);
    expect(walk.cleared).toBe(false);
  });
  test('no-earth-reference-on-backup: nothing opens, the neutral floats', () => {
    const walk = shown(fixture('lost-earth-reference'), 'no-earth-reference-on-backup');
    expect(walk).toMatchObject({ condition: 'main-off', cleared: false });
    expect(walk.steps[0]!.neutralVolts).toBeGreaterThan(200);
  });
  test('no-rcd: the breaker alone clears it, later than an rcd would', () => {
    const walk = shown(smallHome({ rcd: false }).document(), 'no-rcd');
    expect(walk.clearedAfter).toBe(0.1);
  });
  test('rcd-idle-on-backup: no device opens on battery', () => {
    const doc = backupHome().drop('Q5').line('Q4:2', 'LB2').neutral('Q4:4', 'NB2').document();
    expect(shown(doc, 'rcd-idle-on-backup')).toMatchObject({ condition: 'outage', cleared: false });
  });
  test('switched-neutral: with the neutral open the lamp is dark and live', () => {
    const walk = shown(fixture('switched-neutral'), 'switched-neutral');
    expect(walk.dark).toContain('E2');
    expect(walk.live).toContain('E2');
  });
  test('earth-neutral-joined: a lost supply neutral puts the cases to the line', () => {
    const doc = smallHome({ rcd: false, supply: { system: 'TN-C-S' } })
      .neutral('NB0', 'EB')
      .document();
    expect(shown(doc, 'earth-neutral-joined').touchVolts).toBeGreaterThan(200);
  });
  test('short-circuit: what is drawn is walked, with nothing put in', () => {
    const walk = shown(smallHome().line('JL11', 'JN11').document(), 'short-circuit');
    expect(walk.steps.map(({ event }) => event)).toEqual([
      'as drawn, line and neutral are joined at joint in Study',
      'Q11 opens',
    ]);
    expect(walk).toMatchObject({ cleared: true, by: 'Q11', clearedAfter: 0.1, dark: ['E1', 'X1'] });
    expect(walk.faultAmps).toBeGreaterThan(300);
  });
  test('every finding of severity danger in the drawings at hand has its walk, or no fault could show it', () => {
    const notByFault = new Set([
      'mixed-feeds',
      'backfeed',
      'live-pins',
      'reversed-polarity',
      'short-circuit',
      'regulator-feeds-other',
      'no-battery-fuse',
      'battery-reversed',
      'thin-battery-lead',
    ]);
    for (const name of [
      'switched-neutral',
      'missing-earth',
      'mixed-feeds',
      'borrowed-neutral',
      'backup-neutral-other-rcd',
      'backfeed-plug',
      'undersized-cable',
      'lost-earth-reference',
    ]) {
      const context = buildContext(fixture(name));
      for (const finding of runRules(context, rules).filter(({ severity }) => severity === 'danger')) {
        const show = showFault(context, finding);
        if (notByFault.has(finding.rule)) continue;
        expect(show, `${finding.rule} in ${name}`).not.toBeNull();
        expect(
          walkFaults(context.graph, context.evaluation, show!.faults, show!.condition).steps.length,
        ).toBeGreaterThan(0);
      }
    }
  });
});
