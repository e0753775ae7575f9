import { workOutFigures } from '../circuit/way-figures';
import { practices } from '../practices';
import { once } from './readings/once';

/** A home in numbers, by the practice it is judged by. */
export const figuresOf = once(({ graph, evaluation, sections, earth, practice }) =>
  workOutFigures({ graph, evaluation, sections, earth, practice: practices[practice] }),
);
