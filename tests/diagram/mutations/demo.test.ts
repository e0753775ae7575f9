import { describe, expect, it } from 'vitest';
import { applyPatch } from '@/diagram/document/patch';
import { readDocument, type Installation } from '@/diagram/document/schema';
import { examine } from '@/diagram/rules/examine';
import { MISTAKES, apprenticesHome } from '@/lib/server/demo/apprentice';
import { demoHomes } from '@/lib/server/demo/homes';
import { quarryHouse } from '@/lib/server/demo/house';
import { surveySteps } from '@/diagram/survey/step';

const serious = (doc: Installation): string[] =>
  examine(doc)
    .findings.filter(({ severity }) => severity !== 'advice')
    .map(({ rule }) => rule);
const advice = (doc: Installation): string[] =>
  examine(doc)
    .findings.filter(({ severity }) => severity === 'advice')
    .map(({ rule }) => rule);

describe('the homes of the demo', () => {
  it('are valid documents, every part in its place on the sheet', () => {
    for (const { document } of demoHomes()) {
      expect(readDocument(JSON.parse(JSON.stringify(document))).ok).toBe(true);
      const faces = { ...document.sheet!.overview, ...document.sheet!.connections };
      expect(document.parts.filter(({ id }) => !faces[id]).map(({ id }) => id)).toEqual([]);
    }
  });

  it('are right where the electrician drew them', () => {
    for (const { document, byApprentice } of demoHomes())
      if (!byApprentice) expect([document.title, serious(document)]).toEqual([document.title, []]);
  });

  it('are in step with their surveys', () => {
    for (const { document } of demoHomes())
      expect(new Set(surveySteps(document).map(({ state }) => state))).toEqual(new Set(['in-step']));
  });

  it('hold six mistakes of the apprentice, each found by its own rule and by no other', () => {
    expect(serious(apprenticesHome()).sort()).toEqual(MISTAKES.map(({ rule }) => rule).sort());
    expect(new Set(MISTAKES.map(({ rule }) => rule)).size).toBe(6);
    expect(advice(apprenticesHome())).toEqual(advice(quarryHouse()));
  });

  it.each(MISTAKES.map((mistake) => [mistake.rule, mistake] as const))(
    'has a single finding of %s for that mistake alone',
    (rule, mistake) => {
      const home = quarryHouse();
      expect(serious(applyPatch(home, mistake.patch(home)))).toEqual([rule]);
    },
  );
});
