import { execFile } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';
import { buildSync } from 'esbuild';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';

const ROOT = fileURLToPath(new URL('../../../', import.meta.url));
const run = promisify(execFile);
let folder = '';
let command = '';

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'fusekeeper-analyse-'));
  // inside the project, so that its packages are found
  command = join(ROOT, 'node_modules', '.cache', 'analyse-test', 'analyse.js');
  buildSync({
    entryPoints: [join(ROOT, 'server/commands/analyse.ts')],
    bundle: true,
    packages: 'external',
    platform: 'node',
    format: 'esm',
    target: 'node20',
    outfile: command,
    absWorkingDir: ROOT,
    logLevel: 'warning',
  });
  writeFileSync(join(folder, 'run.csv'), dryerRun());
  writeFileSync(join(folder, 'no-unit.csv'), dryerRun().replace(' °F', ''));
  writeFileSync(
    join(folder, 'small.csv'),
    'Elapsed (s),Exhaust °F\n0,70.1\n10,OL\n20,154.99999999999997\n30,80.3\n',
  );
  writeFileSync(join(folder, 'empty.csv'), '');
});

afterAll(() => rmSync(folder, { recursive: true }));

/** Four first-order cycles between about 155 and 130 °F, from 70 °F, a reading a second, to 0.1 °F. */
function dryerRun(): string {
  const rows = ['Elapsed (s),Exhaust °F'];
  let temp = 70;
  let heating = true;
  for (let s = 0; s < 1200; s++) {
    rows.push(`${s},${temp.toFixed(1)}`);
    temp += ((heating ? 200 : 70) - temp) / 150;
    if (heating && temp >= 155) heating = false;
    else if (!heating && temp <= 130) heating = true;
  }
  return `${rows.join('\n')}\n`;
}

type Result = { lines: Record<string, unknown>[]; stderr: string; code: number };

async function analyse(...args: string[]): Promise<Result> {
  const options = { cwd: ROOT, env: { ...process.env, INIT_CWD: folder } };
  const parse = (text: string) =>
    text
      .split('\n')
      .filter(Boolean)
      .map((line) => JSON.parse(line));
  try {
    const { stdout, stderr } = await run(process.execPath, [command, ...args], options);
    return { lines: parse(stdout), stderr, code: 0 };
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && 'stdout' in error)) throw error;
    const { code, stdout, stderr } = error as Error & {
      code: number;
      stdout: string;
      stderr: string;
    };
    return { lines: parse(stdout), stderr, code };
  }
}

describe('npm run analyse', () => {
  test('prints contract 1 for a file of the caller’s folder', async () => {
    const { lines, code, stderr } = await analyse('run.csv');

    expect({ code, stderr, count: lines.length }).toEqual({ code: 0, stderr: '', count: 1 });
    expect(Object.keys(lines[0]!)).toEqual([
      'contract',
      'file',
      'unit',
      'samples',
      'durationS',
      'read',
      'cutOuts',
      'resets',
      'cycles',
      'legs',
      'findings',
      'outcome',
      'guard',
    ]);
    expect(lines[0]).toMatchObject({
      contract: 1,
      file: 'run.csv',
      unit: 'F',
      samples: 1200,
      durationS: 1199,
      read: {
        timeColumn: 'Elapsed (s)',
        channel: 'Exhaust °F',
        channelUnit: 'F',
        delimiter: ',',
        decimal: '.',
        skippedRows: [],
        warnings: [],
        spikes: 0,
        gaps: 0,
      },
    });
  });

  test('prints every reading kept, bit for bit in the file’s unit', async () => {
    const { lines } = await analyse('--series', 'small.csv');

    expect(lines[0]).toMatchObject({
      series: { t: [0, 20, 30], temp: [70.1, 154.99999999999997, 80.3] },
      read: { skippedRows: [{ row: 3, why: 'not a number: OL' }] },
    });
  });

  test('prints in °C, with the defaults converted, where only the unit is told', async () => {
    const [fahrenheit, celsius] = await Promise.all([
      analyse('--series', 'run.csv'),
      analyse('--series', '--unit', 'C', 'run.csv'),
    ]);
    const [f, c] = [fahrenheit.lines[0]!, celsius.lines[0]!];
    const codesOf = (line: Record<string, unknown>) =>
      (line.findings as { code: string }[]).map(({ code }) => code);
    const firstOf = (line: Record<string, unknown>) => (line.series as { temp: number[] }).temp[0]!;

    expect(c.unit).toBe('C');
    expect(codesOf(c)).toEqual(codesOf(f));
    // NIST SP 811 B.8: (70 − 32)/1.8
    expect(firstOf(c)).toBeCloseTo(21.1111, 4);
  });

  test('prints a line for each file in order and leaves 1 where one fails', async () => {
    const { lines, code } = await analyse('run.csv', 'empty.csv', 'not-there.csv', 'no-unit.csv');

    expect(code).toBe(1);
    expect(lines.map(({ file }) => file)).toEqual([
      'run.csv',
      'empty.csv',
      'not-there.csv',
      'no-unit.csv',
    ]);
    expect(lines[1]).toEqual({
      file: 'empty.csv',
      error: {
        code: 'empty-file',
        message: 'The file is empty.',
        row: null,
        column: null,
        value: null,
        hint: 'Save the log again from the logger, and check that the copy is not 0 bytes.',
      },
    });
    expect(lines[2]).toMatchObject({ error: { code: 'unreadable-file', value: 'not-there.csv' } });
    expect(lines[3]).toMatchObject({
      error: { code: 'needs-answer', about: 'unit', options: ['F', 'C'] },
    });
  });

  test('takes an answer, a channel and marks', async () => {
    writeFileSync(
      join(folder, 'marks.json'),
      '[{"t":1150,"kind":"heat-off","text":"selector to air"}]',
    );
    const { lines, code } = await analyse(
      '--assume',
      'unit=F',
      '--channel',
      'Exhaust',
      '--marks',
      'marks.json',
      '--min-cycles',
      '2',
      'no-unit.csv',
    );

    expect(code).toBe(0);
    expect(lines[0]).toMatchObject({ read: { channel: 'Exhaust', channelUnit: 'F' } });
  });

  test('prints only turning points where that is asked', async () => {
    const { lines } = await analyse('--turning-points-only', 'run.csv');

    expect(lines[0]).toMatchObject({ findings: [], outcome: null, guard: { alarmT: null } });
    expect(lines[0]!.cutOuts).not.toEqual([]);
  });

  test.each([
    [['--opens', 'warm', 'run.csv'], '--opens needs a number'],
    [['--opens', '120', 'run.csv'], '--opens must lie above --closes'],
    [['--swing', '0', 'run.csv'], '--swing must be above 0'],
    [['--load', 'wet', 'run.csv'], '--load must be empty or damp'],
    [['--unit', 'K', 'run.csv'], '--unit must be F or C'],
    [['--min-cycles', '2.5', 'run.csv'], '--min-cycles needs a whole number'],
    [['--assume', 'unit', 'run.csv'], '--assume needs ABOUT=ANSWER'],
    [['--marks', 'run.csv', 'run.csv'], '--marks:'],
    [['--sing', 'run.csv'], "Unknown option '--sing'"],
    [[], 'no file is named'],
  ])('refuses the flags %j', async (args, words) => {
    const { lines, code, stderr } = await analyse(...args);

    expect({ lines, code }).toEqual({ lines: [], code: 2 });
    expect(stderr).toContain(words);
    expect(stderr.trim().split('\n')).toHaveLength(1);
  });
});
