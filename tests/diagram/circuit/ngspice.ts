import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { REFERENCE } from '@/diagram/circuit/network';
import type { TestNetwork } from './networks';

/** Hz */
export const FREQUENCY = 50;
/** networks in one process */
const BATCH = 10;
const OMEGA = 2 * Math.PI * FREQUENCY;

export interface SpiceAnswer {
  /** V of each node, complex */
  nodes: { re: number; im: number }[];
  /** A of each branch from a to b, complex */
  branches: { re: number; im: number }[];
}

const number = (value: number) => value.toPrecision(17);

/** The networks side by side in one netlist, a zero-volt source in each branch as its ammeter. */
function netlist(networks: readonly TestNetwork[], vectors: string): string {
  const lines = ['networks to compare'];
  networks.forEach(({ branches, held, pushed }, w) => {
    const name = (node: number) => (node === REFERENCE ? '0' : `n${w}_${node}`);
    held.forEach(({ re, im }, node) => {
      const angle = (Math.atan2(im, re) * 180) / Math.PI;
      lines.push(`vs${w}_${node} ${name(node)} 0 dc 0 ac ${number(Math.hypot(re, im))} ${number(angle)}`);
    });
    pushed?.forEach((amps, node) => lines.push(`is${w}_${node} 0 ${name(node)} dc 0 ac ${number(amps)} 0`));
    branches.forEach(({ a, b, ohm, reactance }, i) => {
      const id = `${w}_${i}`;
      lines.push(`va${id} ${name(a)} a${id} dc 0`);
      const middle = ohm !== 0 && reactance !== 0 ? `b${id}` : name(b);
      if (ohm !== 0) lines.push(`r${id} a${id} ${middle} ${number(ohm)}`);
      const from = ohm !== 0 ? middle : `a${id}`;
      if (reactance > 0) lines.push(`l${id} ${from} ${name(b)} ${number(reactance / OMEGA)}`);
      if (reactance < 0) lines.push(`c${id} ${from} ${name(b)} ${number(-1 / (OMEGA * reactance))}`);
    });
  });
  lines.push(
    '.control',
    'set numdgt=15',
    'set filetype=ascii',
    `ac lin 1 ${FREQUENCY} ${FREQUENCY}`,
    `write ${vectors} all`,
    'quit',
    '.endc',
    '.end',
  );
  return `${lines.join('\n')}\n`;
}

/** Reads an ascii raw file of one complex point: the names, then `re,im` a line. */
function readRaw(path: string): Map<string, { re: number; im: number }> {
  const [header, values] = readFileSync(path, 'utf8').split('Values:\n');
  const names = [...header!.matchAll(/^\t\d+\t(\S+)\t/gm)].map((match) => match[1]!);
  const numbers = [...values!.matchAll(/(\S+),(\S+)/g)].map((match) => ({
    re: Number(match[1]),
    im: Number(match[2]),
  }));
  if (names.length !== numbers.length)
    throw new Error(`ngspice wrote ${numbers.length} values for ${names.length} names`);
  return new Map(names.map((name, i) => [name, numbers[i]!]));
}

/**
 * Solves networks by Debian's ngspice, some of them in each process: its ordering takes longer than in proportion.
 * @throws when ngspice is missing: install it, the comparison is not to be skipped
 */
export function spice(networks: readonly TestNetwork[]): SpiceAnswer[] {
  const batches = Array.from({ length: Math.ceil(networks.length / BATCH) }, (_, i) =>
    networks.slice(i * BATCH, (i + 1) * BATCH),
  );
  return batches.flatMap(batch);
}

function batch(networks: readonly TestNetwork[]): SpiceAnswer[] {
  const folder = mkdtempSync(join(tmpdir(), 'networks-'));
  try {
    const raw = join(folder, 'answer.raw');
    const file = join(folder, 'networks.cir');
    writeFileSync(file, netlist(networks, raw));
    execFileSync('ngspice', ['-b', '-n', file], { stdio: ['ignore', 'pipe', 'pipe'], maxBuffer: 1e9 });
    const vectors = readRaw(raw);
    const read = (name: string) => {
      const found = vectors.get(name);
      if (!found) throw new Error(`ngspice gave no ${name}`);
      return found;
    };
    return networks.map(({ size, branches }, w) => ({
      nodes: Array.from({ length: size }, (_, node) => read(`v(n${w}_${node})`)),
      branches: branches.map((_, i) => read(`i(va${w}_${i})`)),
    }));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
