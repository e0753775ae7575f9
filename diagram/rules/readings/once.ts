import type { Context } from '../context';

/** Makes a reading of a home that several rules share be worked out only once a home. */
export function once<T>(workOut: (context: Context) => T): (context: Context) => T {
  const known = new WeakMap<Context, T>();
  return (context) => {
    if (!known.has(context)) known.set(context, workOut(context));
    return known.get(context)!;
  };
}
