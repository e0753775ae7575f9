import type { Cable, Kind, Part, PartOf } from '../../document/schema';
import type { Remedy } from '../types';

/** Remedies that change a rating or a size in place. */

type Ratings<K extends Kind> = Partial<Omit<PartOf<K>, 'id' | 'kind'>>;

export const changePart = <K extends Kind>(label: string, part: PartOf<K>, fields: Ratings<K>): Remedy => ({
  label,
  patch: { set: { parts: [{ ...part, ...fields } as Part] } },
});

export const changeCables = (label: string, cables: readonly Cable[]): Remedy => ({
  label,
  patch: { set: { cables: [...cables] } },
});
