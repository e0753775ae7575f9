import { readFileSync, readdirSync } from 'node:fs';
import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { TitleBlockPanel } from '@/components/frame/title-block';

const sources = readdirSync('components', { recursive: true, encoding: 'utf8' }).filter((file) => file.endsWith('.tsx'));

/** Fields that take no name: ticks and choices, files, numbers, what is signed in with. */
const NO_NAME = /type="(checkbox|radio|file|email|password)"|type=\{|inputMode="decimal"|readOnly$/;
/** Fields that are typed into to look for words of the product's own. */
const LOOKS_FOR = new Set(['sheet/extend/slip.tsx', 'sheet/extend/slip-foot.tsx', 'jobs/register-head.tsx', 'rules/rule-list.tsx']);
/** A link to be copied. */
const SHOWS = new Set(['people/given-link.tsx']);

/** Every field of the screens, with the attributes that stand before its first handler or its end. */
const fields = sources.flatMap((file) =>
  [...readFileSync(`components/${file}`, 'utf8').matchAll(/<(?:input|textarea)\b([\s\S]*?)\/>/g)].map(([, attributes]) => ({ file, attributes: attributes! })),
);

describe('names in scripts that run from the right', () => {
  it('are typed from their own side in every field that takes one', () => {
    const named = fields.filter(({ file, attributes }) => !NO_NAME.test(attributes) && !LOOKS_FOR.has(file) && !SHOWS.has(file));
    expect([...new Set(named.map(({ file }) => file))].sort()).toEqual([
      ...['grid/grid-cell.tsx', 'plan/plan-foot.tsx', 'sheet/edit-panel.tsx', 'sheet/lists.tsx', 'sheet/room-panel.tsx'],
      ...['survey/paste-box.tsx', 'ui/field.tsx'],
    ]);
    for (const { file, attributes } of named) expect(attributes, file).toMatch(/\bdir=/);
  });

  it('stand in the title block in their own order, which is not turned round for it', () => {
    const block = {
      ...{ number: 'OH-1', title: 'בית הגפן 3', client: '', address: '', team: 'T', drawnBy: '' },
      ...{ drawnOn: '2026-11-30', checkedBy: null, revision: '-', state: 'draft' },
    };
    render(<TitleBlockPanel kind="Overview" block={block} sheet="1 / 1" />);
    expect(screen.getByText(block.title)).toHaveAttribute('dir', 'auto');
  });

  it('are lettered on the sheet by their own direction, wherever a drawing is drawn', () => {
    expect(readFileSync('app/globals.css', 'utf8')).toMatch(/svg text \{\s*unicode-bidi: plaintext;/);
  });
});
