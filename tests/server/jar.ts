import { AsyncLocalStorage } from 'node:async_hooks';

/** The cookies of one browser, with the two calls that the server makes of them. */
export class Jar {
  private readonly kept = new Map<string, string>();

  get(name: string): { name: string; value: string } | undefined {
    const value = this.kept.get(name);
    return value === undefined ? undefined : { name, value };
  }

  set(name: string, value: string): void {
    this.kept.set(name, value);
  }

  copy(): Jar {
    const other = new Jar();
    for (const [name, value] of this.kept) other.set(name, value);
    return other;
  }
}

const answering = new AsyncLocalStorage<Jar>();

/** Runs `work` as the answer to a request that brings these cookies. */
export const withJar = <T>(jar: Jar, work: () => Promise<T>): Promise<T> => answering.run(jar, work);
export const currentJar = (): Jar => answering.getStore() ?? new Jar();
