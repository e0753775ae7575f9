/** Something was asked for that a part of the home does not tell: the whole home must be examined. */
export class Beyond extends Error {
  constructor(what: string) {
    super(`${what} is not known from a part of the home`);
  }
}

/** @throws Beyond where something that the parts of a home must agree in does not hold */
export function mustBe(holds: boolean, what: string): void {
  if (!holds) throw new Beyond(what);
}

const walls = new Map<string, object>();

/** What stands behind all objects of a name: a field that one of them has not is looked for here, and throws. */
function wallOf(name: string): object {
  const wall =
    walls.get(name) ??
    (new Proxy(Object.create(null) as object, {
      get(_, key) {
        throw new Beyond(`${name}.${String(key)}`);
      },
    }));
  walls.set(name, wall);
  return wall;
}

/**
 * Makes of an object one of which only the fields it has are known: reading any other throws `Beyond`, so that nothing is
 * guessed. The wall is its prototype: what is known is read as fast as ever.
 */
export const onlyKnown = <T extends object>(name: string, known: Partial<T>): T =>
  Object.setPrototypeOf(known, wallOf(name)) as T;
