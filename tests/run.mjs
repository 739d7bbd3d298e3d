// What `npm test` runs, in order: types, lint and format, unit and API tests, browser tests.
// All of them run, whatever failed before; the last line counts.
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';

const REPORTS = 'test-results';
const UNIT_REPORT = `${REPORTS}/unit.json`;
const BROWSER_REPORT = `${REPORTS}/browser.json`;

const passedOrFailed = { passed: 0, failed: 0, skipped: 0 };

function count(passed, failed, skipped = 0) {
  passedOrFailed.passed += passed;
  passedOrFailed.failed += failed;
  passedOrFailed.skipped += skipped;
}

function run(title, command, args, env = {}) {
  process.stdout.write(`\n── ${title}\n`);
  const { status } = spawnSync(command, args, {
    stdio: 'inherit',
    env: { ...process.env, ...env },
  });
  return status === 0;
}

/** A check without a count of its own counts as one. */
function check(title, command, args) {
  const ok = run(title, command, args);
  count(ok ? 1 : 0, ok ? 0 : 1);
}

/** Counts from a report; a runner that left none, or failed with none failing, is one failure. */
function suite(title, command, args, report, read, env) {
  const ok = run(title, command, args, env);
  const counts = existsSync(report) ? read(JSON.parse(readFileSync(report, 'utf8'))) : undefined;
  if (counts) count(counts.passed, counts.failed, counts.skipped);
  if (!counts || counts.passed === 0 || (!ok && counts.failed === 0)) count(0, 1);
}

rmSync(REPORTS, { recursive: true, force: true });
mkdirSync(REPORTS, { recursive: true });

check('types', 'npx', ['tsc']);
check('lint', 'npx', ['eslint', '.']);
check('format', 'npx', ['prettier', '--check', '--log-level', 'warn', '.']);
suite(
  'unit and API tests',
  'npx',
  ['vitest', 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${UNIT_REPORT}`],
  UNIT_REPORT,
  (report) => ({
    passed: report.numPassedTests,
    failed: report.numFailedTests,
    skipped: report.numPendingTests + report.numTodoTests,
  }),
);
suite(
  'browser tests',
  'npx',
  ['playwright', 'test', '--reporter=list,json'],
  BROWSER_REPORT,
  ({ stats }) => ({
    passed: stats.expected + stats.flaky,
    failed: stats.unexpected,
    skipped: stats.skipped,
  }),
  { PLAYWRIGHT_JSON_OUTPUT_NAME: BROWSER_REPORT },
);

const { passed, failed, skipped } = passedOrFailed;
process.stdout.write(
  `\n${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}\n`,
);
process.exit(failed > 0 ? 1 : 0);
