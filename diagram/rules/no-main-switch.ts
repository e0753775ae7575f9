import { commanders } from './readings/command';
import { recalled, seen } from './clauses';
import { figuresOf, onMains } from './readings/figures';
import type { Rule } from './types';

/** No device by which the whole home is made dead at once. */
export const noMainSwitch: Rule = {
  meta: {
    id: 'no-main-switch',
    severity: 'defect',
    group: 'overload',
    title: 'Nothing switches the whole home off',
    clauses: [seen('BS 7671', '462.1.201'), recalled('IEC 60364-4-46', '462.1')],
    lesson:
      'Somebody who smells burning must be able to make the home dead with one hand and without a key. A row of ' +
      'breakers is no main switch: one is always forgotten, and the fuse before the meter belongs to the ' +
      'supplier.',
    remedy: 'Put a two-pole main switch behind the meter, before anything branches off.',
  },
  *check(context) {
    const fed = figuresOf(context).drawn.filter(({ source }) => source?.kind === 'mains');
    if (fed.length === 0 || commanders(context).length > 0) return;
    const meter = context.parts('meter')[0] ?? context.parts('supply')[0];
    yield {
      heading: 'There is no main switch',
      message:
        'No one switch, breaker or rcd lies before everything that the mains feed: the home cannot be made dead in one action.',
      parts: meter ? [meter.id] : [],
      conditions: onMains(context),
    };
  },
};
