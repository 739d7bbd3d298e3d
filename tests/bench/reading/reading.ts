import { execFileSync } from 'node:child_process';
import { mkdtempSync, openSync, closeSync, rmSync, statSync, writeSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { seededNormal } from '#tests/support/build-series.ts';

const ROUNDS = 3;
const PATIENCE_MS = 240_000;
const ROWS = 1_000_000;

/**
 * `npm run bench -- reading [ROWS]`: a file of two probes with ISO stamps that cycles throughout, read and fully
 * judged, beside `Papa.parse(text)` alone on the same bytes in the same process; and the memory of a process that
 * reads and judges it once, over the same process idle.
 */
export function bench(args: string[]): void {
  const rows = Number(args[0] ?? ROWS);
  const folder = mkdtempSync(join(tmpdir(), 'fusekeeper-reading-'));
  try {
    const file = join(folder, 'big.csv');
    writeBigLog(file, rows);
    console.log(`${rows} rows, ${(statSync(file).size / 1e6).toFixed(1)} MB`);
    for (const mode of ['speed', 'memory']) process.stdout.write(measure(folder, file, mode));
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** Bundled as the product is, so that what is measured is what is served. */
function measure(folder: string, file: string, mode: string): string {
  const root = fileURLToPath(new URL('../../../', import.meta.url));
  const script = join(root, 'node_modules', '.cache', 'bench-reading', 'measure.js');
  const source = fileURLToPath(new URL('./measure.ts', import.meta.url));
  const esbuild = join(root, 'node_modules', '.bin', 'esbuild');
  const flags = [
    '--bundle',
    '--packages=external',
    '--platform=node',
    '--format=esm',
    '--target=node20',
  ];
  execFileSync(esbuild, [source, ...flags, `--outfile=${script}`, '--log-level=warning'], {
    cwd: root,
  });
  const node = ['--expose-gc', script, file, mode, String(ROUNDS)];
  try {
    return execFileSync(process.execPath, node, {
      encoding: 'utf8',
      cwd: folder,
      timeout: PATIENCE_MS,
    });
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'ETIMEDOUT')) throw error;
    return `${mode}: not done within ${PATIENCE_MS / 1000} s\n`;
  }
}

/** Air heads for these with this time constant, °F and s; the probe follows it, and the thermostat turns it. */
const HEATED_F = 210;
const COOLED_F = 80;
const AIR_S = 120;
const PROBE_S = 4;
const OPENS_F = 155;
const CLOSES_F = 131;
/** Standard deviation of a reading, °F. */
const NOISE_F = 0.15;

/** A dryer that cycles every minute and a half for the whole length, a reading a second, rounded to a tenth. */
function writeBigLog(file: string, rows: number): void {
  const out = openSync(file, 'w');
  const startMs = Date.UTC(2026, 4, 4, 10);
  const random = seededNormal(5);
  let text = 'Time,Exhaust °F,Room °F\n';
  let heats = true;
  let airF = 70;
  let probeF = 70;
  for (let i = 0; i < rows; i++) {
    airF += ((heats ? HEATED_F : COOLED_F) - airF) / AIR_S;
    probeF += (airF - probeF) / PROBE_S;
    if (airF >= OPENS_F) heats = false;
    else if (airF <= CLOSES_F) heats = true;
    const stamp = new Date(startMs + i * 1000).toISOString().slice(0, 19);
    const readF = (probeF + NOISE_F * random()).toFixed(1);
    text += `${stamp}Z,${readF},${(72 + 0.1 * random()).toFixed(1)}\n`;
    if (text.length > 1 << 20) {
      writeSync(out, text);
      text = '';
    }
  }
  writeSync(out, text);
  closeSync(out);
}
