import { readFileSync } from 'node:fs';
import { evaluate } from '@/diagram/circuit/evaluate';
import { walkFaults } from '@/diagram/circuit/fault-walk';
import { FAULT_KINDS, FaultError, type Fault, type FaultKind } from '@/diagram/circuit/fault-types';
import { readDocument, type DocumentError } from '@/diagram/document/schema';
import { buildGraph } from '@/diagram/terminals/graph';

/**
 * npm run -s fault -- FILE.json --at PART --kind KIND [--wire ID] [--condition NAME]
 * A second --at and --kind put in a second fault when the home is still after the first. Prints one JSON object and
 * exits
 * 0; a file that is not a document, or a fault that cannot be walked, prints { errors: [{ path, message }] } and exits
 * 2.
 */

interface Request {
  file: string;
  faults: Fault[];
  condition?: string;
}

const isKind = (text: string): text is FaultKind => (FAULT_KINDS as readonly string[]).includes(text);

class UsageError extends Error {}

function readArguments(args: readonly string[]): Request {
  const faults: Partial<Fault>[] = [];
  let file: string | undefined;
  let condition: string | undefined;
  const latest = (name: keyof Fault): Partial<Fault> => {
    const last = faults[faults.length - 1];
    if (last && last[name] === undefined) return last;
    const fresh: Partial<Fault> = {};
    faults.push(fresh);
    return fresh;
  };
  for (let i = 0; i < args.length; i++) {
    const arg = args[i]!;
    if (!arg.startsWith('--')) {
      if (file !== undefined) throw new UsageError(`one file only: "${file}" and "${arg}" are two`);
      file = arg;
      continue;
    }
    const value = args[++i];
    if (value === undefined) throw new UsageError(`${arg} needs a value`);
    if (arg === '--at') latest('at').at = value;
    else if (arg === '--wire') latest('wire').wire = value;
    else if (arg === '--condition') condition = value;
    else if (arg === '--kind') {
      if (!isKind(value)) throw new UsageError(`--kind is one of ${FAULT_KINDS.join(', ')}`);
      latest('kind').kind = value;
    } else throw new UsageError(`${arg} is not known: --at, --kind, --wire, --condition are`);
  }
  if (file === undefined) throw new UsageError('name the file of a document');
  if (faults.length === 0) throw new UsageError('name the part by --at and the fault by --kind');
  for (const { at, kind } of faults)
    if (at === undefined || kind === undefined) throw new UsageError('each fault needs --at and --kind');
  return { file, faults: faults as Fault[], ...(condition !== undefined && { condition }) };
}

function refuse(errors: DocumentError[]): never {
  process.stdout.write(`${JSON.stringify({ errors })}\n`);
  process.exit(2);
}

function readFile(file: string): unknown {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    return refuse([{ path: file, message: error instanceof Error ? error.message : String(error) }]);
  }
}

function main(): void {
  try {
    const { file, faults, condition } = readArguments(process.argv.slice(2));
    const read = readDocument(readFile(file));
    if (!read.ok) refuse(read.errors);
    const graph = buildGraph(read.document);
    const walk = walkFaults(graph, evaluate(graph), faults, condition);
    const steps = walk.steps.map(
      // What a screen draws at each part and wire is left out: it is of no use in a line of text.
      ({ caseVolts: _cases, loadVolts: _loads, wireAmps: _wires, live: _live, dark: _dark, ...step }) => step,
    );
    process.stdout.write(`${JSON.stringify({ ...walk, steps })}\n`);
  } catch (error) {
    if (!(error instanceof FaultError) && !(error instanceof UsageError)) throw error;
    refuse([{ path: error instanceof UsageError ? '(command line)' : 'fault', message: error.message }]);
  }
}

main();
