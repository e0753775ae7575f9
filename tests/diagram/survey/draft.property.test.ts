import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { hasTerminal, isBar } from '@/diagram/document/kinds';
import { applyPatch, invert, isEmptyPatch } from '@/diagram/document/patch';
import { readDocument, type Installation, type SurveyRoom } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';
import { checkSurvey, soundRooms } from '@/diagram/survey/check';
import { draftDocument, draftPatch, type DraftOptions } from '@/diagram/survey/draft';
import { drawnByPlace, drawnIn } from '@/diagram/survey/drawn';
import { surveySteps } from '@/diagram/survey/step';
import { anySurvey, optionsOf } from './surveys';

const PRACTICES = ['IEC', 'IN', 'GB'] as const;
const SYSTEMS = ['TN-S', 'TN-C-S', 'TT'] as const;
const RUNS = Number(process.env.DRAFT_RUNS ?? 8);

/** Rules whose finding a draft may have: each is said in the survey too, or is advice by its nature. */
const serious = (doc: Installation) =>
  examine(doc)
    .findings.filter(({ severity, rule }) => severity !== 'advice' || rule === 'missing-data')
    .map(({ rule, parts, message }) => `${rule} at ${parts.join(' ')}: ${message}`);

/** What must hold whatever the rules say: ends exist, no terminal of an accessory holds three, ids and designations are unique. */
function expectSound(doc: Installation): void {
  const read = readDocument(JSON.parse(JSON.stringify(doc)));
  expect(read.ok ? [] : read.errors).toEqual([]);
  const parts = new Map(doc.parts.map((part) => [part.id, part]));
  const held = new Map<string, number>();
  for (const { from, to } of doc.wires)
    for (const [id, mark] of [from, to]) {
      expect(hasTerminal(parts.get(id)!, mark), `${id}:${mark}`).toBe(true);
      held.set(`${id} ${mark}`, (held.get(`${id} ${mark}`) ?? 0) + 1);
    }
  for (const [end, count] of held) {
    const one = isBar(parts.get(end.split(' ')[0]!)!.kind);
    expect(count, end).toBeLessThanOrEqual(one ? 1 : 2);
  }
  const refs = doc.parts.flatMap(({ ref }) => (ref ? [ref] : []));
  expect(new Set(refs).size).toBe(refs.length);
}

/** Every lamp, fan, outlet and appliance of the sound rows is drawn, and nothing else. */
function expectAllDrawn(doc: Installation, rooms: readonly SurveyRoom[], withBackup: boolean): void {
  const places = drawnByPlace(doc);
  for (const room of rooms) {
    const drawn = drawnIn(places, room.id);
    expect([drawn.lamps.length, drawn.fans.length, drawn.outlets.length, drawn.heavy.length]).toEqual([
      room.lamps,
      room.fans,
      room.outlets,
      room.heavy.length,
    ]);
    if (withBackup)
      expect([drawn.keptLamps.length, drawn.keptFans.length, drawn.keptOutlets.length]).toEqual([
        room.keepLamps,
        room.keepFans,
        room.keepOutletWatts > 0 ? 1 : 0,
      ]);
  }
}

const homeErrors = (rooms: readonly SurveyRoom[], options: DraftOptions) =>
  checkSurvey(rooms, options).filter(({ room }) => room === null);

describe.each(PRACTICES)('a draft by the practice of %s', (practice) => {
  describe.each(SYSTEMS)('on %s', (system) => {
    it.each([true, false])('is a sound document without danger or defect (backup: %s)', (backup) => {
      fc.assert(
        fc.property(anySurvey(backup), fc.integer({ min: 0, max: 12 }), (rooms, hours) => {
          const options = optionsOf(practice, system, hours);
          fc.pre(homeErrors(rooms, options).length === 0);
          const doc = draftDocument(rooms, options);
          expectSound(doc);
          expectAllDrawn(doc, soundRooms(rooms, options), backup);
          expect(serious(doc)).toEqual([]);
        }),
        { numRuns: RUNS },
      );
    });

    it('is the same bytes each time, in step with its survey, and leaves a further draft nothing', () => {
      fc.assert(
        fc.property(anySurvey(true), (rooms) => {
          const options = optionsOf(practice, system);
          fc.pre(homeErrors(rooms, options).length === 0);
          const doc = draftDocument(rooms, options);
          expect(JSON.stringify(draftDocument(rooms, options))).toBe(JSON.stringify(doc));
          expect(draftPatch(doc)).toEqual({});
          expect(
            new Set(
              surveySteps(doc)
                .map(({ state }) => state)
                .filter((state) => state !== 'waits'),
            ),
          ).toEqual(new Set(soundRooms(rooms, options).length > 0 ? ['in-step'] : []));
        }),
        { numRuns: Math.ceil(RUNS / 3) },
      );
    });
  });

  it('draws a changed survey onto the drawing without danger or defect, and the change can be taken back', () => {
    fc.assert(
      fc.property(anySurvey(true), anySurvey(true), (before, after) => {
        const options = optionsOf(practice, 'TN-S');
        const changed = after.map((room, i) => growing(before[i], room));
        const all = [...changed, ...before.slice(after.length)];
        fc.pre(homeErrors(before, options).length === 0 && homeErrors(all, options).length === 0);
        fc.pre(all.every((room) => room.lampWatts < 100 && room.fanWatts < 200));
        const doc = { ...draftDocument(before, options), survey: all };
        const patch = draftPatch(doc);
        const next = applyPatch(doc, patch);
        expectSound(next);
        expect(isEmptyPatch(draftPatch(next))).toBe(true);
        expect(JSON.stringify(applyPatch(next, invert(doc, patch)))).toBe(JSON.stringify(applyPatch(doc, {})));
        const kept = new Map(next.parts.map((part) => [part.id, part]));
        for (const part of doc.parts)
          if (part.kind !== 'switch' && part.kind !== 'regulator' && part.kind !== 'joint' && part.kind !== 'mcb')
            expect(kept.get(part.id)).toEqual(part);
        // The service and the inverter that are drawn stay: a home that outgrows them is told so, and a person decides.
        const outgrown = /^(backup-overload|overloaded-main|overloaded-way at inverter-feed)\b/;
        expect(serious(next).filter((finding) => !outgrown.test(finding))).toEqual([]);
      }),
      { numRuns: RUNS },
    );
  });
});

/** A row that a person has changed: never less of a thing than was drawn, watts as they were. */
function growing(before: SurveyRoom | undefined, after: SurveyRoom): SurveyRoom {
  if (!before) return after;
  const lamps = Math.max(before.lamps, after.lamps);
  const fans = Math.max(before.fans, after.fans);
  return {
    ...after,
    lampWatts: before.lampWatts,
    fanWatts: before.fanWatts,
    lamps,
    fans,
    outlets: Math.max(before.outlets, after.outlets),
    keepLamps: Math.min(after.keepLamps, lamps),
    keepFans: Math.min(after.keepFans, fans),
    keepOutletWatts: before.keepOutletWatts || after.keepOutletWatts,
    heavy: [
      ...before.heavy,
      ...after.heavy.filter(({ what }) => !before.heavy.some((item) => item.what === what)),
    ].slice(0, 8),
    kind: before.kind,
    ...(before.run !== undefined && { run: before.run }),
  };
}
