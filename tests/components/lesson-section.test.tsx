import { render, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { LessonSection } from '@/components/rules/lesson-section';
import { rules } from '@/diagram/rules';
import { lessonView } from '@/lib/server/lessons';

const show = (rule: string) => {
  const view = lessonView(rule)!;
  return { view, ...render(<LessonSection {...view} />) };
};
const side = (name: 'Wrong' | 'Right') => within(screen.getByRole('region', { name }));

describe('a lesson on its page', () => {
  it('says what the wrong drawing shows and what the finding of it says', () => {
    show('switched-neutral');
    const wrong = side('Wrong');
    expect(wrong.getByRole('img', { name: /through switch S1.*Ringed in red: S1 opens the neutral/ })).toBeVisible();
    expect(wrong.getByRole('heading', { name: 'S1 opens the neutral' })).toBeVisible();
    expect(wrong.getByText(/returns through S1/)).toBeVisible();
    expect(wrong.getByText('holds on mains')).toBeVisible();
  });

  it('says under the right drawing what is otherwise', () => {
    const { view } = show('switched-neutral');
    const right = side('Right');
    expect(right.getByText(view.difference)).toBeVisible();
    expect(right.getByRole('img', { name: /^The same, put right\. S1 stands in the line/ })).toBeVisible();
  });

  it('draws in the inks of the theme alone, with red pencil on the wrong home and none on the right', () => {
    const { container } = show('borrowed-neutral');
    const inks = [...container.querySelectorAll('svg [stroke], svg [fill]')].flatMap((mark) =>
      ['stroke', 'fill'].flatMap((name) => mark.getAttribute(name) ?? []),
    );
    expect(inks.filter((ink) => ink !== 'none' && !/^var\(--[\w-]+\)$/.test(ink))).toEqual([]);
    const pencil = [...container.querySelectorAll('svg')].map(
      (svg) => svg.querySelectorAll('[stroke="var(--red)"]').length,
    );
    // lamp E3, and the wire by which it returns
    expect(pencil).toEqual([2, 0]);
  });

  it('hangs the notice beside the home that has it', () => {
    show('two-sources-unmarked');
    expect(side('Right').getByText('Two sources: isolate the mains and the backup.')).toBeVisible();
    expect(side('Wrong').queryByText('Two sources: isolate the mains and the backup.')).toBeNull();
  });

  it('lets a drawing wider than a phone be moved with the keyboard', () => {
    show('backfeed');
    expect(side('Wrong').getByRole('group', { name: 'Wrong, drawing' })).toHaveAttribute('tabindex', '0');
    expect(document.querySelectorAll('[tabindex="0"]')).toHaveLength(2);
  });

  it('leaves a narrow one alone', () => {
    show('overloaded-way');
    expect(document.querySelectorAll('[tabindex]')).toHaveLength(0);
  });
});

describe('the lessons', () => {
  it.each(rules.map(({ meta }) => meta.id))('%s is drawn once and kept, both homes at one scale', (id) => {
    const view = lessonView(id)!;
    expect(lessonView(id)).toBe(view);
    expect(view.wrong.crop.width).toBe(view.right.crop.width);
    const box = [view.wrong.crop, view.right.crop].flatMap(({ x, y, width, height }) => [x, y, width, height]);
    expect(box.every(Number.isFinite)).toBe(true);
  });

  it('has nothing for a rule that does not exist', () => expect(lessonView('no-such-rule')).toBeNull());
});
