import type { Finding } from '../rules/types';
import { findingKey } from './findings-at';

const ORDER = { danger: 0, defect: 1, advice: 2 } as const;
const MOST = 3;

const findingsWord = (count: number): string => (count === 1 ? '1 finding' : `${count} findings`);

/**
 * What a screen reader is told after an edit: which findings came, how many went, how many stand.
 * @param before null before the first examination: then only the number is said
 * @returns empty where nothing changed
 */
export function findingsNews(before: readonly Finding[] | null, after: readonly Finding[]): string {
  const open = (list: readonly Finding[]) => list.filter((finding) => !finding.silenced);
  const now = open(after);
  const stands = now.length === 0 ? 'No finding.' : `${findingsWord(now.length)} in all.`;
  if (before === null) return stands;
  const known = new Set(open(before).map(findingKey));
  const left = new Set(now.map(findingKey));
  const came = now.filter((finding) => !known.has(findingKey(finding)));
  const gone = [...known].filter((key) => !left.has(key)).length;
  if (came.length === 0 && gone === 0) return '';
  came.sort((a, b) => ORDER[a.severity] - ORDER[b.severity]);
  const said = came.slice(0, MOST).map((finding) => `New ${finding.severity}: ${finding.heading}.`);
  if (came.length > MOST) said.push(`${came.length - MOST} more new.`);
  if (gone > 0) said.push(`${gone} gone.`);
  return [...said, stands].join(' ');
}
