import { spawn } from 'node:child_process';

/** Something a person has to put right: its message is the whole explanation, no stack is shown. */
export class Stop extends Error {}

export const isRoot = () => process.getuid?.() === 0;

const running = new Set();
// A build or an installation that is still going on ends with us.
process.on('exit', () => running.forEach((child) => child.kill()));

/**
 * Runs a program to its end.
 * @param {string} program
 * @param {string[]} [args]
 * @param {{ env?: Record<string, string | undefined>, cwd?: string, show?: boolean, input?: string }} [options]
 *   `show` lets it write to this terminal; otherwise what it wrote is in the answer.
 * @returns {Promise<{ status: number, output: string }>} status 127 when there is no such program
 */
export function run(program, args = [], { env, cwd, show = false, input } = {}) {
  return new Promise((resolve) => {
    const child = spawn(program, args, {
      cwd,
      env: env ? { ...process.env, ...env } : process.env,
      stdio: [input === undefined ? 'ignore' : 'pipe', show ? 'inherit' : 'pipe', show ? 'inherit' : 'pipe'],
    });
    running.add(child);
    child.once('close', () => running.delete(child));
    let output = '';
    child.stdout?.on('data', (text) => (output += text));
    child.stderr?.on('data', (text) => (output += text));
    child.on('error', (error) => resolve({ status: error.code === 'ENOENT' ? 127 : 126, output: error.message }));
    child.on('close', (status, signal) => resolve({ status: status ?? (signal ? 130 : 1), output }));
    if (input !== undefined) child.stdin.end(input);
  });
}

/** The last line of a program's output that says something, for a one-line explanation. */
export const lastLine = (output) => output.trim().split('\n').filter(Boolean).at(-1)?.trim() ?? 'it gave no reason';
