import { describe, expect, it } from 'vitest';
import { suggest } from '@/diagram/commands/extend/catalogue';
import { moveLoad, waysFor } from '@/diagram/commands/move-load';
import { placeSupply, placeSupplyAlone } from '@/diagram/commands/place-supply';
import { isRefusal, type Command, type Refusal } from '@/diagram/commands/types';
import { applyPatch } from '@/diagram/document/patch';
import {
  emptyDocument,
  readDocument,
  type End,
  type Installation,
  type PracticeId,
  type Supply,
} from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';
import { counter } from './counter';

const TN: Supply = { system: 'TN-S', voltage: 230, frequency: 50, ze: 0.4, zln: 0.3 };
const TT: Supply = { system: 'TT', voltage: 230, frequency: 50, zln: 0.25, ra: 20 };

/** A person at an empty sheet who only ever extends. */
class Hand {
  doc: Installation;
  at: End = ['', ''];
  private readonly newId = counter();

  constructor(practice: PracticeId = 'IEC', supply: Supply = TN) {
    this.doc = emptyDocument('Kiln Row 3', practice, supply);
  }

  do(outcome: Command | Refusal): this {
    if (isRefusal(outcome)) throw new Error(outcome.refused);
    this.doc = applyPatch(this.doc, outcome.patch);
    this.at = outcome.next ?? this.at;
    return this;
  }

  lines(typed = ''): string[] {
    return suggest(this.doc, this.at, { newId: this.newId, typed }).fitting.map((line) => line.what);
  }

  /** Types, and takes the first line that fits. */
  extend(typed: string, choice: Record<string, number> = {}): this {
    const [line] = suggest(this.doc, this.at, { newId: this.newId, typed, hoursWanted: 3 }).fitting;
    if (!line) throw new Error(`nothing fits "${typed}" at ${this.at.join(':')}`);
    return this.do(line.place(choice));
  }

  move(loads: string[], device: string): this {
    return this.do(moveLoad(this.doc, loads, device, this.newId));
  }

  find = (kind: string, n = 0) =>
    this.doc.parts
      .filter((part) => part.kind === kind)
      .sort((a, b) => (a.ref ?? a.id).localeCompare(b.ref ?? b.id, undefined, { numeric: true }))[n]!;
}

const bad = (doc: Installation) =>
  examine(doc)
    .findings.filter((finding) => finding.severity !== 'advice')
    .map((finding) => `${finding.rule} ${finding.parts.join(' ')}`);

describe.each([
  ['IEC', TN],
  ['IEC', TT],
  ['IN', TN],
  ['GB', TN],
] as const)('a home drawn from nothing by extending, %s %o', (practice, supply) => {
  it('has no danger and no defect at any step', () => {
    const hand = new Hand(practice, supply).do(placeSupply(hand0(practice, supply)));
    const bar = hand.at;
    const steps = [
      () => hand.extend('study lamps', { lamps: 2 }),
      () => hand.extend('fan'),
      () => hand.extend('two-way'),
      () => ((hand.at = bar), hand.extend('kitchen outlets', { outlets: 3 })),
      () => hand.extend('outlet'),
      () => ((hand.at = bar), hand.extend('kitchen heater')),
      () => ((hand.at = bar), hand.extend('backup source')),
      () => hand.extend('study lamps'),
      () => hand.extend('loop kitchen'),
      () => ((hand.at = bar), hand.extend('bedroom whole')),
    ];
    for (const step of steps) {
      step();
      expect(bad(hand.doc)).toEqual([]);
    }
    expect(readDocument(JSON.parse(JSON.stringify(hand.doc))).ok).toBe(true);
    expect(hand.doc.parts.length).toBeGreaterThan(60);
  });
});

const hand0 = (practice: PracticeId, supply: Supply) => emptyDocument('Kiln Row 3', practice, supply);

describe('the origin piece by piece', () => {
  it('goes from the service line to a way', () => {
    const hand = new Hand().do(placeSupplyAlone(hand0('IEC', TN)));
    for (const typed of ['service fuse', 'meter', 'main switch', 'rcd bars', 'hall lamps']) hand.extend(typed);
    const kinds = hand.doc.parts.map((part) => part.kind);
    for (const kind of [
      'supply',
      'fuse',
      'meter',
      'isolator',
      'rcd',
      'line-bar',
      'neutral-bar',
      'earth-bar',
      'mcb',
      'switch',
      'lamp',
    ])
      expect(kinds).toContain(kind);
    expect(
      examine(hand.doc).findings.filter(
        (finding) =>
          finding.severity === 'danger' && finding.rule !== 'no-main-earth' && finding.rule !== 'missing-earth',
      ),
    ).toEqual([]);
  });

  it('lands what hangs free where it belongs', () => {
    const hand = new Hand().do(placeSupplyAlone(hand0('IEC', TN)));
    for (const typed of ['service fuse', 'meter', 'main switch', 'rcd bars', 'hall lamps']) hand.extend(typed);
    const earthBar = hand.find('earth-bar');
    hand.at = ['supply', 'E'];
    const wire = { id: 'w', from: ['supply', 'E'] as End, to: [earthBar.id, '9'] as End, role: 'earth' as const };
    hand.doc = applyPatch(hand.doc, { set: { wires: [wire] } });
    expect(bad(hand.doc)).toEqual([]);
  });
});

describe('suggestions', () => {
  const atBar = () => new Hand().do(placeSupply(hand0('IEC', TN)));

  it('puts what the survey lacks first, with its reason', () => {
    const hand = atBar();
    hand.doc = applyPatch(hand.doc, {
      set: {
        survey: [
          {
            id: 'hall',
            order: 1,
            name: 'Hall',
            kind: 'passage',
            lamps: 0,
            lampWatts: 9,
            fans: 0,
            fanWatts: 55,
            outlets: 0,
            heavy: [],
            keepLamps: 0,
            keepFans: 0,
            keepOutletWatts: 0,
            hours: 0,
          },
          {
            id: 'study',
            order: 2,
            name: 'Study',
            kind: 'room',
            lamps: 0,
            lampWatts: 9,
            fans: 0,
            fanWatts: 55,
            outlets: 2,
            heavy: [],
            keepLamps: 0,
            keepFans: 0,
            keepOutletWatts: 0,
            hours: 0,
          },
        ],
      },
    });
    const [first] = suggest(hand.doc, hand.at, { newId: counter() }).all;
    expect(first!.what).toBe('way to the study, outlets');
    expect(first!.reason).toBe('the survey has 2 outlets there not yet drawn');
    expect(first!.counts).toEqual([{ id: 'outlets', label: 'outlet', count: 2, most: 10 }]);
  });

  it('narrows by the beginnings of words, and offers a new room only behind what is known', () => {
    const hand = atBar().extend('study lamps');
    hand.at = ['rcd1.line-bar', '9'];
    expect(hand.lines('stu out')).toEqual(['way to the study, outlets']);
    expect(hand.lines('sp')[0]).toBe('spare way, closed off');
    expect(hand.lines('larder out')).toEqual(['way to a new room, Larder, outlets']);
  });

  it('has nothing at a terminal that does not exist', () => {
    expect(suggest(atBar().doc, ['no', '1'], { newId: counter() }).all).toEqual([]);
  });

  it('offers at a switch the load it works, at a regulator its fan', () => {
    const hand = atBar().extend('study lamps', { lamps: 1, fans: 1 });
    const control = hand.find('switch');
    hand.doc = applyPatch(hand.doc, {
      remove: {
        wires: hand.doc.wires
          .filter((wire) => wire.from[0] === control.id && wire.from[1] === '2')
          .map((wire) => wire.id),
      },
    });
    hand.at = [control.id, '2'];
    expect(hand.lines().slice(0, 2)).toEqual(['lamp', 'fan with regulator']);
    hand.extend('lamp');
    expect(bad(hand.doc).filter((line) => !line.includes(hand.find('lamp').id))).toEqual([]);
    hand.at = [hand.find('regulator').id, '2'];
    expect(hand.lines()).toContain('fan');
  });
});

describe('moving loads between ways', () => {
  const home = () => {
    const hand = new Hand().do(placeSupply(hand0('IEC', TN)));
    const bar = hand.at;
    hand.extend('study lamps', { lamps: 2, fans: 1 });
    hand.at = bar;
    hand.extend('kitchen outlets', { outlets: 3 });
    hand.at = bar;
    hand.extend('backup source').extend('study lamps');
    return hand;
  };
  const backupOf = (hand: Hand, load: string) => waysFor(hand.doc, load).find((way) => way.backup)!.device;

  it('takes a fan with its switch and regulator to backup: line, neutral and earth', () => {
    const hand = home();
    const fan = hand.find('fan').id;
    const feeds = (doc: Installation) => examine(doc).loads.find((load) => load.part === fan)!.conditions;
    expect(feeds(hand.doc).outage!.fed).toBe(false);
    const moved = moveLoad(hand.doc, [fan], backupOf(hand, fan), counter('w'));
    expect(moved).toMatchObject({ label: 'Move Study fan to backup' });
    hand.move([fan], backupOf(hand, fan));
    expect(bad(hand.doc)).toEqual([]);
    expect(feeds(hand.doc).outage!.fed).toBe(true);
    expect(feeds(hand.doc).mains!.fed).toBe(true);
  });

  it('keeps a row of outlets whole when one of its middle goes', () => {
    const hand = home();
    const [, middle] = hand.doc.parts.filter((part) => part.kind === 'socket').map((part) => part.id);
    hand.move([middle!], backupOf(hand, middle!));
    expect(
      bad(hand.doc).filter(
        (line) => !line.startsWith('overloaded') && !line.startsWith('undersized') && !line.startsWith('heavy'),
      ),
    ).toEqual([]);
    const fed = examine(hand.doc).loads.filter(
      (load) => hand.doc.parts.find((part) => part.id === load.part)?.kind === 'socket',
    );
    expect(fed.map((load) => load.conditions.mains!.fed)).toEqual([true, true, true]);
    expect(fed.filter((load) => load.conditions.outage!.fed).map((load) => load.part)).toEqual([middle]);
  });

  it('goes there and back to a home that is as sound as before', () => {
    const hand = home();
    const fan = hand.find('fan').id;
    const mains = waysFor(hand.doc, hand.find('socket').id).find(
      (way) => !way.backup && way.words.includes('lamps'),
    )!.device;
    hand.move([fan], backupOf(hand, fan)).move([fan], mains);
    expect(bad(hand.doc)).toEqual([]);
    expect(examine(hand.doc).loads.find((load) => load.part === fan)!.conditions.outage!.fed).toBe(false);
  });

  it('says why it cannot', () => {
    const hand = home();
    const fan = hand.find('fan').id;
    const way = backupOf(hand, fan);
    hand.move([fan], way);
    expect(() => hand.move([fan], way)).toThrow('is on that way already');
    expect(moveLoad(hand.doc, ['nothing'], way, counter())).toHaveProperty('refused');
  });
});
