import { byCode } from '../document/schema';

/** Scenes list everything by id, so that the order of drawing leaves no trace. */
export const byIdOf = (a: { id: string }, b: { id: string }): number => byCode(a.id, b.id);
