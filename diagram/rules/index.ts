import type { Rule } from './types';

/** Every rule, by id; the file of a rule has its name. One line a rule, in order of the alphabet. */
export const rules: readonly Rule[] = [
];
