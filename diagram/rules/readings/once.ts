import type { Context } from '../context';

/** A reading of a home that is worked out once, and may be given where it is known already. */
export interface Reading<T> {
  (context: Context): T;
  /** Puts down what the reading of this home is, so that it is not worked out. */
  give(context: Context, value: T): void;
}

/** Makes a reading of a home that several rules share be worked out only once a home. */
export function once<T>(workOut: (context: Context) => T): Reading<T> {
  const known = new WeakMap<Context, T>();
  const read = (context: Context) => {
    if (!known.has(context)) known.set(context, workOut(context));
    return known.get(context)!;
  };
  return Object.assign(read, { give: (context: Context, value: T) => void known.set(context, value) });
}
