import { access, mkdir, readFile, rm } from 'node:fs/promises';
import path from 'node:path';
import { installPackages } from './debian.mjs';
import { explain } from './explain.mjs';
import { installDependencies } from './install.mjs';
import { run } from './run.mjs';

/**
 * Everything that proves the product: unit, component and server tests, the browser against the built app, lint, types.
 * All of it runs even if one part fails. It needs Node and npm; what else is missing it installs. It uses a database of
 * its own that is thrown away, and never touches .data.
 */
const REPORTS = path.resolve('test-results');
const PROGRAMS = { chromium: '/usr/bin/chromium', ngspice: '/usr/bin/ngspice', 'poppler-utils': '/usr/bin/pdftoppm' };

const node = (args, env) => run(process.execPath, args, { show: true, env: { NEXT_TELEMETRY_DISABLED: '1', ...env } });
const readReport = async (name) => JSON.parse(await readFile(path.join(REPORTS, name), 'utf8'));

async function installPrograms() {
  const missing = [];
  for (const [name, file] of Object.entries(PROGRAMS)) await access(file).catch(() => missing.push(name));
  if (missing.length > 0) await installPackages(missing, missing.join(', '));
}

/** One check that passes or fails as a whole. */
const whole = ({ status }) => ({ passed: status === 0 ? 1 : 0, failed: status === 0 ? 0 : 1 });

const parts = {
  async lint() {
    return whole(await node(['node_modules/eslint/bin/eslint.js', '.', '--max-warnings', '0']));
  },
  async types() {
    // Types of pages that are gone stay behind and would not compile.
    for (const folder of ['.next/types', '.next/dev/types', '.next-test/types'])
      await rm(folder, { recursive: true, force: true });
    const made = await node(['node_modules/next/dist/bin/next', 'typegen']);
    return whole(
      made.status === 0 ? await node(['node_modules/typescript/bin/tsc', '--noEmit', '--incremental', 'false']) : made,
    );
  },
  async vitest() {
    const report = path.join(REPORTS, 'vitest.json');
    const { status } = await node([
      ...['node_modules/vitest/vitest.mjs', 'run', '--config', 'tests/vitest.config.mts'],
      ...['--reporter=default', '--reporter=json', `--outputFile.json=${report}`],
    ]);
    const { numPassedTests, numFailedTests, testResults } = await readReport('vitest.json');
    // A file that cannot even be loaded has no test that could fail.
    const broken = testResults.filter((file) => file.status === 'failed' && file.assertionResults.length === 0).length;
    const failed = numFailedTests + broken;
    return { passed: numPassedTests, failed: failed === 0 && status !== 0 ? 1 : failed };
  },
  async browser() {
    const { status } = await node(
      ['node_modules/playwright/cli.js', 'test', '--config', 'tests/e2e/playwright.config.ts'],
      { E2E_REPORT: path.join(REPORTS, 'browser.json') },
    );
    const { stats, errors } = await readReport('browser.json');
    const failed = stats.unexpected + stats.flaky + errors.length;
    return { passed: stats.expected, failed: failed === 0 && status !== 0 ? 1 : failed };
  },
};

// Leaving in the middle takes along what is running.
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => process.exit(130));
try {
  await installDependencies();
  await installPrograms();
  await rm(REPORTS, { recursive: true, force: true });
  await mkdir(REPORTS, { recursive: true });
  const totals = { passed: 0, failed: 0 };
  const lines = [];
  for (const [name, check] of Object.entries(parts)) {
    console.log(`\n== ${name} ==`);
    const began = Date.now();
    const { passed, failed } = await check().catch((error) => {
      console.error(explain(error));
      return { passed: 0, failed: 1 };
    });
    totals.passed += passed;
    totals.failed += failed;
    lines.push(
      `${name.padEnd(8)} ${String(passed).padStart(6)} passed ${String(failed).padStart(4)} failed ${((Date.now() - began) / 1000).toFixed(0).padStart(5)} s`,
    );
  }
  console.log(`\n${lines.join('\n')}\n`);
  console.log(`${totals.passed} passed, ${totals.failed} failed`);
  process.exitCode = totals.failed === 0 ? 0 : 1;
} catch (error) {
  console.error(explain(error));
  console.log('0 passed, 1 failed');
  process.exitCode = 1;
}
