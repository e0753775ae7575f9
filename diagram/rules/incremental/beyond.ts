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

/** A field that is worked out when it is first asked for. */
export function later<T extends object, K extends keyof T>(object: T, key: K, workOut: () => T[K]): void {
  const put = (value: T[K]) => Object.defineProperty(object, key, { value, enumerable: true });
  Object.defineProperty(object, key, {
    configurable: true,
    enumerable: true,
    get: () => {
      const value = workOut();
      put(value);
      return value;
    },
  });
}
