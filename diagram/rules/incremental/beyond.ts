/** Something was asked for that a part of the home does not tell: the whole home must be examined. */
export class Beyond extends Error {
  constructor(what: string) {
    super(`${what} is not known from a part of the home`);
  }
}

/** An object of which only some fields are known: reading any other throws `Beyond`, so that nothing is guessed. */
export function onlyKnown<T extends object>(name: string, known: Partial<T>): T {
  const unknown = new Proxy(Object.create(null) as object, {
    get(_, key) {
      throw new Beyond(`${name}.${String(key)}`);
    },
  });
  // As a prototype it is asked only for what the object itself has not: what is known is read as fast as ever.
  return Object.setPrototypeOf({ ...known }, unknown) as T;
}
