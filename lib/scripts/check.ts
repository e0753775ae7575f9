import { readFileSync } from 'node:fs';
import { examine } from '@/diagram/rules/examine';
import { PracticeIdSchema, readDocument, type DocumentError, type PracticeId } from '@/diagram/document/schema';

/**
 * npm run -s check -- FILE.json ... [--practice IEC|IN|GB]
 * One JSON object a line on stdout. Exit status: 0 no danger or defect, 1 some, 2 a file is not a valid document; of
 * several files the worst.
 */

type Answer = { line: object; status: 0 | 1 | 2 };

const invalid = (file: string, errors: DocumentError[]): Answer => ({ line: { file, errors }, status: 2 });

function checkFile(file: string, practice: PracticeId | undefined): Answer {
  let data: unknown;
  try {
    data = JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    const message =
      error instanceof SyntaxError
        ? `this is not JSON: ${error.message}`
        : `this file cannot be read: ${String(error instanceof Error ? error.message : error)}`;
    return invalid(file, [{ path: '(file)', message }]);
  }
  const read = readDocument(data);
  if (!read.ok) return invalid(file, read.errors);
  const { schema, ...rest } = examine(read.document, practice);
  const bad = rest.findings.some(({ severity }) => severity !== 'advice');
  return { line: { schema, file, ...rest }, status: bad ? 1 : 0 };
}

/** Files and options of a command line; an error in words where it cannot be understood. */
function readArguments(args: readonly string[]): { files: string[]; practice?: PracticeId } | string {
  const files: string[] = [];
  let practice: PracticeId | undefined;
  for (let i = 0; i < args.length; i++) {
    const arg = args[i]!;
    if (arg !== '--practice' && !arg.startsWith('--practice=')) {
      if (arg.startsWith('--')) return `Unknown option ${arg}.`;
      files.push(arg);
      continue;
    }
    const parsed = PracticeIdSchema.safeParse(arg.includes('=') ? arg.slice(arg.indexOf('=') + 1) : args[++i]);
    if (!parsed.success) return '--practice is IEC, IN or GB.';
    practice = parsed.data;
  }
  return files.length > 0 ? { files, ...(practice && { practice }) } : 'Name at least one file.';
}

const options = readArguments(process.argv.slice(2));
if (typeof options === 'string') {
  process.stderr.write(`${options}\nUsage: npm run -s check -- FILE.json ... [--practice IEC|IN|GB]\n`);
  process.exitCode = 2;
} else {
  let worst = 0;
  for (const file of options.files) {
    const { line, status } = checkFile(file, options.practice);
    process.stdout.write(`${JSON.stringify(line)}\n`);
    worst = Math.max(worst, status);
  }
  process.exitCode = worst;
}
