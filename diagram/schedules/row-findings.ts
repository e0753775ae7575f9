import type { Finding } from '../rules/types';
import type { Row } from './types';

/** The findings that name what a row stands for, the gravest first. */
export function findingsOf(row: Row, findings: readonly Finding[]): Finding[] {
  const parts = new Set(row.parts);
  const wires = new Set(row.wires);
  return findings.filter(
    (finding) => finding.parts.some((id) => parts.has(id)) || finding.wires.some((id) => wires.has(id)),
  );
}
