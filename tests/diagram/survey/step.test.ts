import { describe, expect, it } from 'vitest';
import { applyPatch, isEmptyPatch, type Patch } from '@/diagram/document/patch';
import type { Installation, SurveyRoom } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';
import { draftDocument, draftPatch } from '@/diagram/survey/draft';
import { stepsToDraw, surveySteps, takeIntoSurvey } from '@/diagram/survey/step';
import { traceFeeds } from '@/diagram/terminals/feeds';
import { optionsOf, room, sixRooms } from './surveys';

const fresh = () => draftDocument(sixRooms(), optionsOf());
const changeRow = (doc: Installation, id: string, fields: Partial<SurveyRoom>): Installation => ({
  ...doc,
  survey: doc.survey!.map((row) => (row.id === id ? { ...row, ...fields } : row)),
});
const wordsOf = (doc: Installation) => Object.fromEntries(surveySteps(doc).map(({ room: id, words }) => [id, words]));
const feedOf = (doc: Installation, part: string) => traceFeeds(doc).parts.get(part);
const setParts = (patch: Patch) => (patch.set?.parts ?? []).map(({ id }) => id).sort();

describe('the state of a row against the sheet', () => {
  it('is in step after a draft', () => {
    expect(new Set(Object.values(wordsOf(fresh())))).toEqual(new Set(['in step']));
  });

  it('says what the sheet has not', () => {
    const doc = changeRow(fresh(), 'study', { outlets: 4, heavy: [{ what: 'heater', watts: 1500 }] });
    expect(wordsOf(doc).study).toBe('+1 outlet, +heater');
    expect(stepsToDraw(surveySteps(doc)).map(({ room: id }) => id)).toEqual(['study']);
  });

  it('waits while the row has an error', () => {
    expect(wordsOf(changeRow(fresh(), 'kitchen', { keepLamps: 3 })).kitchen).toBe('waits');
  });

  it('knows a room that is not drawn yet', () => {
    const doc = { ...fresh(), survey: [...sixRooms(), room('Attic', { lamps: 1, order: 9 })] };
    expect(wordsOf(doc).attic).toBe('not drawn yet');
  });

  it('knows what is drawn and not in the survey: things of a row, and a place without one', () => {
    const doc = changeRow(fresh(), 'hall', { lamps: 1, keepLamps: 1 });
    expect(wordsOf(doc).hall).toBe('1 lamp not in the survey');
    expect(wordsOf({ ...doc, survey: doc.survey!.slice(1) }).hall).toBe('drawn, not in the survey');
  });

  it('says when watts differ', () => {
    expect(wordsOf(changeRow(fresh(), 'hall', { lampWatts: 12 })).hall).toBe('drawn with lamps of 9 W');
  });

  it('says what changes sides', () => {
    expect(wordsOf(changeRow(fresh(), 'hall', { keepLamps: 2 })).hall).toBe('1 lamp to backup');
    expect(wordsOf(changeRow(fresh(), 'study', { keepFans: 0 })).study).toBe('1 fan to mains');
  });
});

describe('taking the sheet into the survey', () => {
  it('writes what is drawn into the row and keeps what only the survey knows', () => {
    const doc = changeRow(fresh(), 'study', {
      lamps: 5,
      lampWatts: 20,
      outlets: 0,
      heavy: [{ what: 'x', watts: 1 }],
      keepFans: 0,
      hours: 7,
      run: 22,
    });
    const next = applyPatch(doc, takeIntoSurvey(doc, 'study'));
    expect(next.survey!.find(({ id }) => id === 'study')).toEqual({ ...sixRooms()[4], hours: 7, run: 22 });
    expect(wordsOf(next).study).toBe('in step');
  });

  it('makes a row for a place that has none', () => {
    const doc = { ...fresh(), survey: sixRooms().slice(0, 5) };
    const next = applyPatch(doc, takeIntoSurvey(doc, 'bedroom'));
    expect(next.survey![5]).toMatchObject({
      id: 'bedroom',
      name: 'Bedroom',
      kind: 'sleeping',
      lamps: 2,
      fans: 1,
      outlets: 2,
      keepLamps: 1,
      keepFans: 1,
      order: 5,
    });
    expect(isEmptyPatch(draftPatch(next))).toBe(true);
  });

  it('refuses a place that is not there', () => {
    expect(() => takeIntoSurvey(fresh(), 'attic')).toThrow('the document has no place attic');
  });
});

describe('drafting what changed', () => {
  it('leaves a fresh draft alone', () => {
    expect(draftPatch(fresh())).toEqual({});
  });

  it('hangs one more outlet on the row that is there, and touches nothing else', () => {
    const doc = changeRow(fresh(), 'study', { outlets: 4 });
    const patch = draftPatch(doc);
    expect(setParts(patch)).toEqual(['study.outlet4']);
    expect(patch.set!.wires!.map(({ id, from }) => [id, from[0]])).toEqual([
      ['study.outlet4:E', 'study.outlet3'],
      ['study.outlet4:L', 'study.outlet3'],
      ['study.outlet4:N', 'study.outlet3'],
    ]);
    expect(patch.remove).toBeUndefined();
    expect(Object.keys(patch.set!.overview!)).toEqual(['study.outlet4']);
  });

  it('hangs one more lamp on the way that is there, before the run to the next room', () => {
    const doc = changeRow(fresh(), 'hall', { lamps: 3 });
    const next = applyPatch(doc, draftPatch(doc));
    const wire = (id: string) => next.wires.find((one) => one.id === id)!;
    expect(setParts(draftPatch(doc))).toEqual(['hall.lamp3', 'hall.lamp3.switch']);
    expect(wire('hall.lamp3.switch:1').from).toEqual(['hall.lamp2.switch', '1']);
    expect(wire('front-room.lamp2.switch:1').from).toEqual(['hall.lamp3.switch', '1']);
    expect(wordsOf(next).hall).toBe('in step');
  });

  it('keeps what was moved and changed by hand', () => {
    const doc = changeRow(fresh(), 'hall', { lamps: 3 });
    const hand: Installation = {
      ...doc,
      parts: doc.parts.map((part) =>
        part.id === 'hall.lamp2' ? { ...part, label: 'over the stairs', watts: 11 } : part,
      ) as Installation['parts'],
      sheet: { ...doc.sheet, overview: { ...doc.sheet!.overview, 'hall.lamp2': { x: 1250, y: 2500, pinned: true } } },
    };
    const next = applyPatch(hand, draftPatch(hand));
    expect(next.parts.find(({ id }) => id === 'hall.lamp2')).toMatchObject({ label: 'over the stairs', watts: 11 });
    expect(next.sheet!.overview!['hall.lamp2']).toEqual({ x: 1250, y: 2500, pinned: true });
  });

  it('draws a new room on ways of its own, and a row with an error not at all', () => {
    const rows = [
      ...sixRooms(),
      room('Attic', { lamps: 2, outlets: 1, keepLamps: 1, order: 8 }),
      room('Cellar', { lamps: 1, keepLamps: 2, order: 9 }),
    ];
    const doc = { ...fresh(), survey: rows };
    const next = applyPatch(doc, draftPatch(doc));
    expect(wordsOf(next)).toMatchObject({ attic: 'in step', cellar: 'waits' });
    expect(next.places.some(({ id }) => id === 'cellar')).toBe(false);
    expect(feedOf(next, 'attic.lamp1')).toBe('backup');
    expect(feedOf(next, 'attic.lamp2')).toBe('mains');
  });

  it('moves a lamp to backup as it is, switch and neutral with it', () => {
    const doc = changeRow(fresh(), 'hall', { keepLamps: 2 });
    const before = doc.parts.find(({ id }) => id === 'hall.lamp2');
    const next = applyPatch(doc, draftPatch(doc));
    expect(next.parts.find(({ id }) => id === 'hall.lamp2')).toEqual(before);
    expect(feedOf(next, 'hall.lamp2')).toBe('backup');
    // The hall had the only mains lamp of its part of way 1: the run to the front room goes on through a joint.
    expect(feedOf(next, 'front-room.lamp2')).toBe('mains');
    expect(wordsOf(next).hall).toBe('in step');
  });

  it('moves the first lamp of a row and leaves the row its switch', () => {
    const doc = draftDocument(
      [room('Hall', { lamps: 10, lampWatts: 4 }), room('Den', { keepOutletWatts: 20, order: 1 })],
      optionsOf(),
    );
    const first = doc.parts.find(({ id }) => id === 'hall.lamp8.switch');
    expect(first).toBeDefined();
    const next = applyPatch(
      changeRow(doc, 'hall', { keepLamps: 3 }),
      draftPatch(changeRow(doc, 'hall', { keepLamps: 3 })),
    );
    expect(['hall.lamp8', 'hall.lamp9', 'hall.lamp10', 'hall.lamp7'].map((id) => feedOf(next, id))).toEqual([
      'backup',
      'backup',
      'backup',
      'mains',
    ]);
    expect(examine(next).findings.filter(({ severity }) => severity !== 'advice')).toEqual([]);
  });

  it('moves a fan to the mains, and makes the breaker of an emptied way a spare', () => {
    const doc = draftDocument(
      [
        room('Study', { fans: 1, keepFans: 1, hours: 2 }),
        room('Den', { lamps: 1, keepLamps: 1, order: 1, lampWatts: 1200 }),
      ],
      optionsOf(),
    );
    const next = applyPatch(
      changeRow(doc, 'study', { keepFans: 0 }),
      draftPatch(changeRow(doc, 'study', { keepFans: 0 })),
    );
    expect(feedOf(next, 'study.fan1')).toBe('mains');
    expect(next.parts.find(({ id }) => id === 'study.way-backup1')).toMatchObject({ spare: true });
    expect(next.cables.some(({ id }) => id === 'study.backup1.run')).toBe(false);
  });

  it('gives a home without backup its source when the first thing is to stay on', () => {
    const rows = [room('Study', { lamps: 2, outlets: 2 })];
    const doc = changeRow(draftDocument(rows, optionsOf('GB', 'TN-C-S', 0)), 'study', { keepLamps: 1, hours: 3 });
    const next = applyPatch(doc, draftPatch(doc));
    expect(next.parts.some(({ kind }) => kind === 'inverter')).toBe(true);
    expect(feedOf(next, 'study.lamp2')).toBe('backup');
    expect(feedOf(next, 'study.lamp1')).toBe('mains');
    expect(next.notices!.length).toBeGreaterThanOrEqual(2);
    expect(draftPatch(next)).toEqual({});
  });

  it('takes a new way where the old one would lose too much on so long a run', () => {
    const rows = [room('Shed', { lamps: 1, lampWatts: 150, run: 180 })];
    const doc = changeRow(draftDocument(rows, optionsOf('IEC', 'TN-S', 0)), 'shed', { lamps: 2 });
    // 150 W over 180 m of 1.5 mm2 lose 2 x 180 x 12.1e-3 x 1.1965 x 0.72 = 3.8 V of 6.9; twice the load would lose 7.6.
    const next = applyPatch(doc, draftPatch(doc));
    expect(next.parts.some(({ id }) => id === 'shed.way-lamps2')).toBe(true);
    expect(examine(next).findings.filter(({ rule }) => rule === 'high-drop')).toEqual([]);
  });

  it('guards the feed of an inverter whose breaker the loop of the supply would not open', () => {
    // C and B of 40 A and more ask for 0.55 and 1.09 ohm or less (BS 7671 Table 41.3); the loop is 1.2 ohm before the run.
    const options = { ...optionsOf('IEC', 'TN-S', 0), supply: { ...optionsOf('IEC', 'TN-S').supply, ze: 1.2 } };
    const rows = [room('Study', { lamps: 4, lampWatts: 1000, keepLamps: 4, hours: 1 })];
    const doc = draftDocument(rows, options);
    expect(doc.parts.find(({ id }) => id === 'inverter-feed-rcd')).toMatchObject({ sensitivity: 0.3, delay: 'S' });
    expect(draftDocument(rows, optionsOf('IEC', 'TT', 0)).parts.some(({ id }) => id === 'inverter-feed-rcd')).toBe(
      false,
    );
    const serious = examine(doc).findings.filter(({ severity }) => severity !== 'advice');
    expect(serious.map(({ rule }) => rule)).toEqual([]);
  });

  it('touches only the room that changed', () => {
    const doc = changeRow(fresh(), 'study', { outlets: 4, lamps: 3, heavy: [{ what: 'heater', watts: 1500 }] });
    const { set, remove } = draftPatch(doc);
    expect(remove).toBeUndefined();
    expect(set!.parts!.every(({ id }) => id.startsWith('study.'))).toBe(true);
  });

  it('leaves a sheet alone whose board it cannot read', () => {
    const doc: Installation = { ...fresh(), parts: fresh().parts.filter(({ kind }) => kind !== 'rcd') };
    expect(draftPatch(changeRow(doc, 'study', { outlets: 9 }))).toEqual({});
  });
});
