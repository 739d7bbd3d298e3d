// What `npm test` runs: unit and API tests, then browser tests; types, lint and format beside them, since each of
// those keeps but one core busy. All of them run, whatever failed before; the last line counts.
import { spawn } from 'node:child_process';
import { once } from 'node:events';
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

/** Whether it ended well. What runs beside another speaks once it has ended, all at once. */
async function run(title, command, args, { env = {}, isBeside = false } = {}) {
  const say = (words) => process.stdout.write(words);
  const started = performance.now();
  if (!isBeside) say(`\n── ${title}\n`);
  const child = spawn(command, args, {
    stdio: isBeside ? ['ignore', 'pipe', 'pipe'] : 'inherit',
    env: { ...process.env, ...env },
  });
  const said = [];
  for (const stream of [child.stdout, child.stderr]) {
    stream?.on('data', (chunk) => said.push(chunk));
  }
  const [status] = await once(child, 'close');
  const tookS = Math.round((performance.now() - started) / 1000);
  if (isBeside) say(`\n── ${title}\n${Buffer.concat(said)}`);
  say(`── ${title}: ${status === 0 ? 'well' : 'failed'} after ${tookS} s\n`);
  return status === 0;
}

/** A check without a count of its own counts as one. */
async function check(title, command, args) {
  const ok = await run(title, command, args, { isBeside: true });
  count(ok ? 1 : 0, ok ? 0 : 1);
}

/** Counts from a report; a runner that left none, or failed with none failing, is one failure. */
async function suite(title, command, args, report, read, env) {
  const ok = await run(title, command, args, { env });
  const counts = existsSync(report) ? read(JSON.parse(readFileSync(report, 'utf8'))) : undefined;
  if (counts) count(counts.passed, counts.failed, counts.skipped);
  if (!counts || counts.passed === 0 || (!ok && counts.failed === 0)) count(0, 1);
}

async function checkWhatIsWritten() {
  await check('types', 'npx', ['tsc']);
  await check('lint', 'npx', ['eslint', '.']);
  await check('format', 'npx', ['prettier', '--check', '--log-level', 'warn', '.']);
}

async function runTests() {
  await suite(
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
  await suite(
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
}

rmSync(REPORTS, { recursive: true, force: true });
mkdirSync(REPORTS, { recursive: true });
await Promise.all([runTests(), checkWhatIsWritten()]);

const { passed, failed, skipped } = passedOrFailed;
process.stdout.write(
  `\n${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}\n`,
);
process.exit(failed > 0 ? 1 : 0);
