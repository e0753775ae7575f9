import type { Installation } from '@/diagram/document/schema';
import { BACKUP } from './mutations/backup';
import { cleanHomes } from './mutations/clean-homes';
import { DRAWING } from './mutations/drawing';
import { Home } from './mutations/edit';
import { OVERLOAD } from './mutations/overload';
import { POLARITY } from './mutations/polarity';
import { SEPARATION } from './mutations/separation';
import { SHOCK } from './mutations/shock';

export interface Planted {
  mistake: string;
  clean: Installation;
  wrong: Installation;
}

/** Every mistake of the collection made once, in one home and place after the other. @param times how often each */
export function plantedMistakes(times: number): Planted[] {
  const homes = [...cleanHomes().values()];
  return [...POLARITY, ...SEPARATION, ...SHOCK, ...OVERLOAD, ...BACKUP, ...DRAWING].flatMap((mutation, at) => {
    const found: Planted[] = [];
    for (let i = 0; i < homes.length && found.length < times; i++) {
      const clean = homes[(at * 7 + i) % homes.length]!;
      const made = mutation.make(new Home(clean));
      const wrong = made[at % Math.max(1, made.length)];
      if (wrong) found.push({ mistake: `${mutation.rule}: ${mutation.mistake}`, clean, wrong: wrong.doc });
    }
    return found;
  });
}
