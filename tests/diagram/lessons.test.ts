import { describe, expect, it } from 'vitest';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { lessonFor, lessonIds } from '@/diagram/lessons';
import type { Lesson } from '@/diagram/lessons/types';
import { buildScene } from '@/diagram/layout/build-scene';
import type { Point, Scene, ScenePart, SceneText } from '@/diagram/layout/scene';
import { textBox } from '@/diagram/layout/text-box';
import { cropTo, trim } from '@/diagram/paper/crop';
import { partRings, wireRings } from '@/diagram/paper/pencil';
import { rules } from '@/diagram/rules';
import { examine } from '@/diagram/rules/examine';

const findingsOf = (document: Installation) => examine(document).findings;

/** Rules, other than the lesson's own, of the dangers and defects of a home. */
const others = (document: Installation, rule: string): string[] =>
  findingsOf(document)
    .filter((finding) => finding.rule !== rule && finding.severity !== 'advice')
    .map((finding) => finding.rule);

const middle = ({ x, y, width, height }: ScenePart): Point => ({ x: x + width / 2, y: y + height / 2 });
const textsOf = (scene: Scene): SceneText[] => [
  ...[...scene.parts, ...scene.runs, ...scene.frames].flatMap(({ texts }) => texts),
  ...scene.texts,
];

const isValid = (document: Installation): boolean => readDocument(JSON.parse(JSON.stringify(document))).ok;

describe('the lessons of the catalogue', () => {
  it('are there for every rule, and for nothing else', () => {
    expect([...lessonIds].sort()).toEqual(rules.map(({ meta }) => meta.id).sort());
  });

  it('draw a second fault only where the first cannot be without it', () => {
    const also = lessonIds.flatMap((id) => (lessonFor(id)!.also?.rules ?? []).map((rule) => `${rule} in ${id}`));
    expect(also).toEqual(['mixed-feeds in backfeed']);
  });

  it('give nothing for a rule that does not exist', () => {
    expect(lessonFor('no-such-rule')).toBeUndefined();
    expect(lessonFor('toString')).toBeUndefined();
  });
});

describe.each(rules.map(({ meta }) => [meta.id, lessonFor(meta.id)!] as [string, Lesson]))(
  'the lesson of %s',
  (id, lesson) => {
    it('is of two valid documents', () => {
      expect([isValid(lesson.wrong), isValid(lesson.right)]).toEqual([true, true]);
    });

    it('has one finding of its rule in the wrong home, and no other fault', () => {
      expect(findingsOf(lesson.wrong).filter(({ rule }) => rule === id)).toHaveLength(1);
      expect(others(lesson.wrong, id)).toEqual(lesson.also?.rules ?? []);
    });

    it('has neither that finding nor a fault in the right one', () => {
      expect(findingsOf(lesson.right).filter(({ rule }) => rule === id)).toEqual([]);
      expect(others(lesson.right, id)).toEqual([]);
    });

    it('shows a part or wire that the finding names, and cuts no word', () => {
      const finding = findingsOf(lesson.wrong).find(({ rule }) => rule === id)!;
      const scene = buildScene(lesson.wrong, lesson.face, { place: lesson.place });
      const crop = cropTo(scene, lesson.focus);
      const within = ({ x, y }: Point) =>
        x >= crop.x && y >= crop.y && x <= crop.x + crop.width && y <= crop.y + crop.height;
      const parts = scene.parts.filter((part) => finding.parts.includes(part.id) && within(middle(part)));
      const runs = scene.runs.filter(
        ({ wires, points }) => wires.some((wire) => finding.wires.includes(wire)) && points.some(within),
      );
      expect([...parts, ...runs]).not.toEqual([]);
      for (const text of textsOf(trim(scene, crop))) {
        const box = textBox(text);
        expect([text.text, within(box), within({ x: box.x + box.width, y: box.y + box.height })]).toEqual([
          text.text,
          true,
          true,
        ]);
      }
    });

    it('rings each part that the finding names and the drawing has', () => {
      const finding = findingsOf(lesson.wrong).find(({ rule }) => rule === id)!;
      const scene = buildScene(lesson.wrong, lesson.face, { place: lesson.place });
      const named = scene.parts.filter((part) => finding.parts.includes(part.id));
      const runs = scene.runs.filter(({ wires }) => wires.some((wire) => finding.wires.includes(wire)));
      expect(partRings(scene, finding.parts).marks).toHaveLength(named.length);
      expect(wireRings(scene, finding.wires).marks).toHaveLength(2 * runs.length);
    });

    it('says in words what both drawings show', () => {
      for (const words of [lesson.shows, lesson.difference]) expect(words).toMatch(/^[A-Z0-9].{15,}\.$/);
    });
  },
);
