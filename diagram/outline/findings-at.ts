import type { Part } from '../document/schema';
import type { Finding } from '../rules/types';

/** A finding's name as long as it stands: its rule and what it names. */
export const findingKey = ({ rule, parts, wires }: Pick<Finding, 'rule' | 'parts' | 'wires'>): string =>
  [rule, ...parts, ...wires].join(' ');

const push = (map: Map<string, Finding[]>, key: string, finding: Finding): void => {
  const list = map.get(key);
  if (list) list.push(finding);
  else map.set(key, [finding]);
};

/** Findings by the things that they name; each is told in full at one place only, its first part or else its first wire. */
export class FindingsAt {
  private readonly parts = new Map<string, Finding[]>();
  private readonly wires = new Map<string, Finding[]>();
  private readonly fullAtPart = new Map<string, Finding[]>();
  private readonly fullAtWire = new Map<string, Finding[]>();
  private readonly nowhere: Finding[] = [];

  constructor(findings: readonly Finding[], drawn: ReadonlyMap<string, Part>) {
    for (const finding of findings) {
      if (finding.silenced) continue;
      for (const id of finding.parts) push(this.parts, id, finding);
      for (const id of finding.wires) push(this.wires, id, finding);
      const part = finding.parts.find((id) => drawn.has(id));
      const wire = finding.wires[0];
      if (part !== undefined) push(this.fullAtPart, part, finding);
      else if (wire !== undefined) push(this.fullAtWire, wire, finding);
      else this.nowhere.push(finding);
    }
  }

  ofPart = (id: string): readonly Finding[] => this.parts.get(id) ?? [];
  ofWire = (id: string): readonly Finding[] => this.wires.get(id) ?? [];
  shownAtPart = (id: string): readonly Finding[] => this.fullAtPart.get(id) ?? [];
  /** A wire stands at both its ends, its findings at the far one. */
  shownAtWire = (id: string, far: boolean): readonly Finding[] => (far ? (this.fullAtWire.get(id) ?? []) : []);
  /** Findings about the home as a whole. */
  unplaced = (): readonly Finding[] => this.nowhere;
}
