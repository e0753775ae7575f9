import type { DemandGroup } from '../practices/types';

/** Groups of the allowances by what people call an appliance; all else is heating and power. */
const GROUP_WORDS: readonly (readonly [DemandGroup, RegExp])[] = [
  ['cooker', /cooker|oven|hob|stove|range|tandoor/i],
  ['instant-water', /shower|instant|tap/i],
  ['thermostatic-water', /geyser|boiler|water|immersion|cylinder/i],
  ['storage-heating', /storage|floor heat|underfloor/i],
];

/** The group of the demand table that an appliance falls in by its name. */
export const demandGroup = (what: string): DemandGroup =>
  GROUP_WORDS.find(([, words]) => words.test(what))?.[0] ?? 'heating-power';
