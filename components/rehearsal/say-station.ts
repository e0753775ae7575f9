import type { Walk } from '@/diagram/rehearsal/walk';
import { timeText, voltText } from '@/diagram/rehearsal/words';

/** A station of a walk as a screen reader says it. */
export function sayStation({ stations }: Walk, index: number): string {
  const { t, heading, text, touchVolts } = stations[index]!;
  const when = t === null ? '' : `, ${timeText(t)}`;
  return `Step ${index + 1} of ${stations.length}${when}: ${heading}. ${text} Case at ${voltText(touchVolts)}.`;
}
