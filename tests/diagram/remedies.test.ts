import { describe, expect, it } from 'vitest';
import type { Drawing } from '@/diagram/document/builder';
import { backupHome, Home, smallHome, type HomeOptions } from '@/diagram/document/home';
import { applyPatch } from '@/diagram/document/patch';
import { readDocument } from '@/diagram/document/schema';
import { remediesFor } from '@/diagram/rules/remedies-for';
import { findingsOf } from './rule-tester';

const twoWays = (options: HomeOptions = {}) =>
  new Home(options)
    .place('study', 'room', { name: 'Study' })
    .place('den', 'room', { name: 'Den' })
    .way('Q11', 'study')
    .lamp('E1', 'S1', 'Q11')
    .way('Q12', 'den')
    .lamp('E2', 'S2', 'Q12')
    .socket('X2', 'Q12');

/** For each rule a drawing that breaks it, and what is offered: each was tried, and each leaves a valid document. */
const CASES: Record<string, [rule: string, drawing: Drawing, offers: string[]]> = {
  'a lamp the wrong way round': [
    'reversed-polarity',
    smallHome().move('E1:L', 'S1:2', 'E1:N').move('E1:N', 'JN11', 'E1:L'),
    ['Change the two wires over'],
  ],
  'a way the wrong way round': [
    'reversed-polarity',
    smallHome().move('JL11:1', 'Q11:2', 'JN11:9').move('JN11:1', 'NB', 'JL11:9'),
    ['Change the two wires over'],
  ],
  'a switch in the neutral': [
    'switched-neutral',
    smallHome()
      .cut('JL11', 'S1')
      .cut('S1', 'E1')
      .cut('JN11', 'E1')
      .line('JL11', 'E1:L')
      .neutral('JN11', 'S1:1')
      .neutral('S1:2', 'E1:N'),
    ['Lead the line through S1'],
  ],
  'a fuse in the neutral': [
    'fused-neutral',
    smallHome()
      .part('fuse', 'F5', 'hall', { rating: 10 })
      .cut('NB', 'JN11')
      .neutral('NB', 'F5:1')
      .neutral('F5:2', 'JN11', 'k11'),
    ['Take F5 out of the neutral'],
  ],
  'a switch in the earth': [
    'switched-earth',
    smallHome().part('switch', 'S9', 'study').cut('JE11', 'X1:E').earth('JE11', 'S9:1').earth('S9:2', 'X1:E'),
    ['Take the earth past S9'],
  ],
  'an outlet without earth': ['missing-earth', smallHome().cut('JE11', 'X1'), ['Join X1 to the joint in Study']],
  'a way without earth core': [
    'missing-earth',
    smallHome().cut('EB', 'JE11'),
    ['Join the joint in Study to the earth bar in Hall'],
  ],
  'an earth core on the neutral bar': [
    'missing-earth',
    smallHome().move('EB', 'JE11', 'NB'),
    ['Move the earth core to the earth bar in Hall'],
  ],
  'a bar without main earth': [
    'no-main-earth',
    smallHome().cut('SUP:E', 'EB'),
    ['Join the supply in Hall to the earth bar in Hall'],
  ],
  'neutral and earth joined': ['earth-neutral-joined', smallHome().neutral('NB', 'EB'), ['Take the joint out']],
  'the main earth core on the line of the supply': [
    'short-circuit',
    smallHome().move('SUP:E', 'EB', 'SUP:L'),
    ['Move the main earth to E of the supply in Hall'],
  ],
  'the main earth core on the neutral of the supply': [
    'earth-neutral-joined',
    smallHome().move('SUP:E', 'EB', 'SUP:N'),
    ['Move the main earth to E of the supply in Hall'],
  ],
  'a short circuit': ['short-circuit', smallHome().line('JL11', 'JN11'), ['Take the wire out']],
  'a lamp without neutral': ['open-neutral', smallHome().cut('JN11', 'E1'), ['Join E1 to the joint in Study']],
  'a way without neutral': [
    'open-neutral',
    smallHome().cut('NB', 'JN11'),
    ['Join the joint in Study to the neutral bar in Hall'],
  ],
  'a switch without line': ['open-line', smallHome().cut('JL11', 'S1'), ['Join S1 to the joint in Study']],
  'two ways joined': ['mixed-feeds', twoWays().line('JL11', 'JL12'), ['Take the link out']],
  'a borrowed neutral': [
    'borrowed-neutral',
    twoWays().lamp('E3', 'S3', 'Q11').move('JN11', 'E3', 'JN12'),
    ['Move the neutral to the joint in Study'],
  ],
  'two neutrals joined': ['borrowed-neutral', twoWays().neutral('JN11', 'JN12'), ['Take the link out']],
  'a neutral round the rcd': [
    'residual-imbalance',
    twoWays().move('NB', 'JN11', 'NB0'),
    ['Move the neutral to the neutral bar in Hall'],
  ],
  'a backed-up neutral on the mains bar': [
    'backup-neutral-lost',
    backupHome().move('NB2', 'JN21', 'NB'),
    ['Move the neutral to the neutral bar in Hall'],
  ],
  'a lead that feeds back': [
    'backfeed',
    backupHome()
      .socket('X3', 'Q11')
      .part('plug', 'PL9', 'study', { in: 'X3' })
      .cable('k9', 1.5, 9)
      .line('Q4:2', 'PL9:L', 'k9')
      .neutral('Q4:4', 'PL9:N', 'k9')
      .earth('EB', 'PL9:E', 'k9'),
    ['Take PL9 and its lead away'],
  ],
  'live pins': [
    'live-pins',
    smallHome().part('plug', 'PL1', 'study').line('JL11', 'PL1:L').neutral('JN11', 'PL1:N').earth('JE11', 'PL1:E'),
    ['Take PL1 and its lead away'],
  ],
  'an inverter without bond': ['no-earth-reference-on-backup', backupHome({ bond: false }), ['Bond G1 on battery']],
  'outlets behind a coarse rcd': ['no-rcd', smallHome({ rcd: { sensitivity: 0.3 } }), ['Make Q2 one of 30 mA']],
  'one designation twice': ['duplicate-ref', smallHome().set('S1', { ref: 'Q11' }), ['Call the other Q3']],
  'a wire that goes nowhere': ['loose-wire', smallHome().line('JL11', 'S1:3'), ['Take the wire away']],
  'a bypassed switch': ['bypassed-contact', smallHome().line('S1:1', 'S1:2'), ['Take out the wire between S1']],
  'a line drawn as neutral': [
    'line-role-mismatch',
    smallHome().cut('S1', 'E1').neutral('S1:2', 'E1:L', 'cE1'),
    ['Draw it as line'],
  ],
  'a part joined to nothing': ['unused-part', smallHome().part('joint', 'J9', 'study'), ['Take it off the sheet']],
  'a way without a name': ['unnamed-way', smallHome().set('Q11', { label: undefined }), ['Name it Study']],
  'a breaker with nothing behind it': [
    'open-terminal',
    smallHome()
      .part('mcb', 'Q12', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'x' })
      .line('LB', 'Q12:1'),
    ['Mark it as spare'],
  ],
  'a wrong colour': [
    'wrong-colour',
    smallHome()
      .cut('JL11', 'X1')
      .wire('line', 'JL11', 'X1:L', undefined, { colour: 'BU' })
      .cut('JN11', 'X1')
      .wire('neutral', 'JN11', 'X1:N', undefined, { colour: 'BU' }),
    ['Take a core in BN'],
  ],
  'three wires at one terminal': [
    'crowded-terminal',
    smallHome()
      .socket('X2', 'Q11')
      .socket('X3', 'Q11')
      .cut('JL11', 'X2')
      .cut('JL11', 'X3')
      .line('X1:L', 'X2:L')
      .line('X1:L', 'X3:L'),
    ['Join them in a connector behind it'],
  ],
  'an inverter too small for what runs': [
    'backup-overload',
    backupHome({ va: 100, surge: 200 }).set('X2', { load: 200 }),
    ['Fit an inverter of 400 VA', 'Move Q21 to the mains'],
  ],
  'a start beyond the inverter': [
    'backup-surge',
    backupHome({ va: 400, surge: 450 }).fan('M2', 'S3', 'R3', 'Q21', { watts: 90, surge: 4 }),
    ['Fit an inverter of 600 VA', 'Move Q21 to the mains'],
  ],
  'a bank that lasts too short': [
    'short-autonomy',
    backupHome({ hoursWanted: 12 }).set('X2', { load: 60 }),
    ['Fit a battery of 220 Ah', 'Fit 2 such batteries in parallel', 'Move Q21 to the mains'],
  ],
  'a flooded battery in a bedroom': [
    'battery-place',
    backupHome()
      .place('alcove', 'room', { name: 'Alcove', sleeping: true })
      .place('porch', 'outdoor', { name: 'Porch' })
      .set('G2', { chemistry: 'flooded', place: 'alcove' }),
    ['Fit a sealed battery', 'Stand it in Porch'],
  ],
  'two rcds in series without delay': [
    'no-selectivity',
    smallHome()
      .part('rcd', 'Q6', 'hall', { rating: 63, sensitivity: 0.03, type: 'A', delay: 'none' })
      .cut('LB0', 'Q2')
      .cut('NB0', 'Q2')
      .line('LB0', 'Q6:1')
      .neutral('NB0', 'Q6:3')
      .line('Q6:2', 'Q2:1')
      .neutral('Q6:4', 'Q2:3'),
    ['Make Q6 one of type S, 100 mA'],
  ],
  'no main switch': [
    'no-main-switch',
    twoWays({ rcd: false })
      .cut('P1', 'Q1')
      .cut('Q1', 'LB0')
      .cut('Q1', 'NB0')
      .drop('Q1')
      .line('P1:4', 'LB0')
      .neutral('P1:3', 'NB0'),
    ['Put a two-pole main switch behind the meter'],
  ],
  'no service fuse': [
    'no-overcurrent',
    smallHome().cut('SUP:L', 'F1').cut('F1', 'P1').drop('F1').line('SUP:L', 'P1:1'),
    ['Put a service fuse of 63 A before the meter'],
  ],
  'a lamp that nothing switches': [
    'permanent-feed',
    smallHome().cut('JL11', 'S1').cut('S1', 'E1').drop('S1').line('JL11', 'E1:L', 'cE1'),
    ['Put a switch into its line'],
  ],
  'common and strapper changed over': [
    'two-way-miswired',
    smallHome()
      .twoWay('E3', 'S31', 'S32', 'Q11')
      .move('S32:C', 'E3:L', 'S32:9')
      .move('S32:1', 'S31:1', 'S32:C')
      .move('S32:9', 'E3:L', 'S32:1'),
    ['Wire them the usual way'],
  ],
  'neutral bars of mains and backup linked': [
    'backup-neutral-behind-other-rcd',
    backupHome().neutral('NB', 'NB2'),
    ['Take the link out'],
  ],
  'no rcd on battery': [
    'rcd-idle-on-backup',
    backupHome().drop('Q5').line('Q4:2', 'LB2').neutral('Q4:4', 'NB2'),
    ['Fit an rcbo of 30 mA, the neutral through it'],
  ],
  'an rcd with its neutral fed from the wrong end': [
    'residual-imbalance',
    smallHome().move('Q2:3', 'NB0', 'Q2:4').move('Q2:4', 'NB', 'Q2:3'),
    ['Turn the neutral of Q2 round'],
  ],
  "the service's line core on the neutral": [
    'open-line',
    smallHome().move('SUP:L', 'F1:1', 'SUP:N'),
    ['Move the line from N to L of the supply in Hall'],
  ],
  "the service's neutral core on the line": [
    'open-neutral',
    smallHome().move('SUP:N', 'P1:2', 'SUP:L'),
    ['Move the neutral from L to N of the supply in Hall'],
  ],
  'a way whose line begins on the neutral bar': [
    'open-line',
    smallHome().move('LB', 'Q11:1', 'NB'),
    ['Move the line to the line bar in Hall'],
  ],
};

describe('remedies', () => {
  it.each(Object.entries(CASES))('%s', (_, [rule, drawing, offers]) => {
    const document = drawing.document();
    const before = findingsOf(document);
    const finding = before.find((each) => each.rule === rule);
    expect(finding).toBeDefined();
    const remedies = remediesFor(document, finding!);
    expect(remedies.map(({ label }) => label)).toEqual(offers);
    for (const { patch } of remedies) {
      const after = applyPatch(document, patch);
      expect(readDocument(JSON.parse(JSON.stringify(after))).ok).toBe(true);
      const left = findingsOf(after);
      expect(left.filter((each) => each.rule === rule && each.message === finding!.message)).toEqual([]);
      expect(left.length).toBeLessThan(before.length);
    }
  });

  it('are offered here for 38 rules; those of size and rating are proved beside their rules', () => {
    expect(new Set(Object.values(CASES).map(([rule]) => rule)).size).toBe(38);
  });

  it('are not offered where they would bring another finding', () => {
    // Without its second wire the breaker would lead nowhere.
    const home = smallHome()
      .part('mcb', 'Q12', 'hall', { poles: 1, rating: 6, curve: 'B', icn: 6000, label: 'too' })
      .line('LB', 'Q12:1')
      .line('Q12:2', 'JL11');
    const finding = findingsOf(home.document()).find(({ rule }) => rule === 'mixed-feeds')!;
    expect(remediesFor(home.document(), finding)).toEqual([]);
  });
});
