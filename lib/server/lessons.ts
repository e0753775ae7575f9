import 'server-only';
import { buildScene } from '@/diagram/layout/build-scene';
import { lessonFor } from '@/diagram/lessons';
import type { Lesson } from '@/diagram/lessons/types';
import { cropTo, trim, type Picture } from '@/diagram/paper/crop';
import { sceneGroups } from '@/diagram/paper/draw-scene';
import { partRings, wireRings } from '@/diagram/paper/pencil';
import { examine } from '@/diagram/rules/examine';
import type { Finding } from '@/diagram/rules/types';

export interface LessonView {
  wrong: Picture;
  right: Picture;
  /** of the rule, in the wrong home */
  finding: Finding;
  shows: string;
  difference: string;
  /** notices that stand in the right home and not in the wrong one */
  notices: string[];
}

/** Both homes, of one width, so that they are drawn at one scale. */
function pictures({ wrong, right, face, place, focus }: Lesson, { parts, wires }: Finding): [Picture, Picture] {
  const scenes = [buildScene(wrong, face, { place }), buildScene(right, face, { place })] as const;
  const crops = [cropTo(scenes[0], focus), cropTo(scenes[1], focus)] as const;
  const width = Math.max(crops[0].width, crops[1].width);
  const seen = (i: 0 | 1) => ({ crop: { ...crops[i], width }, scene: trim(scenes[i], { ...crops[i], width }) });
  const [first, second] = [seen(0), seen(1)];
  return [
    {
      crop: first.crop,
      groups: [wireRings(first.scene, wires), ...sceneGroups(first.scene), partRings(first.scene, parts)],
    },
    { crop: second.crop, groups: sceneGroups(second.scene) },
  ];
}

function draw(ruleId: string): LessonView | null {
  const lesson = lessonFor(ruleId);
  const finding = lesson && examine(lesson.wrong).findings.find(({ rule }) => rule === ruleId);
  if (!lesson || !finding) return null;
  const before = new Set(lesson.wrong.notices?.map(({ text, place }) => `${place} ${text}`));
  const [wrong, right] = pictures(lesson, finding);
  return {
    wrong,
    right,
    finding,
    shows: lesson.shows,
    difference: lesson.difference,
    notices: (lesson.right.notices ?? [])
      .filter(({ place, text }) => !before.has(`${place} ${text}`))
      .map(({ text }) => text),
  };
}

const drawn = new Map<string, LessonView | null>();

/** The lesson of a rule, examined and drawn once and then kept; null for a rule without one. */
export function lessonView(ruleId: string): LessonView | null {
  const kept = drawn.get(ruleId);
  if (kept !== undefined) return kept;
  const view = draw(ruleId);
  drawn.set(ruleId, view);
  return view;
}
