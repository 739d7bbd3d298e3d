import { readFileSync } from 'node:fs';
import Papa from 'papaparse';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import type { Analysis } from '#shared/analysis/analysis.ts';
import { findTurnsOnly } from '#shared/analysis/find-turns-only.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { readLog } from '#shared/reading/read-log.ts';
import type { LogReading } from '#shared/reading/log-reading.ts';

const [file = '', mode = 'speed', rounds = '5'] = process.argv.slice(2);

function read(bytes: Uint8Array): LogReading {
  const outcome = readLog(bytes);
  if (outcome.kind !== 'read') throw new Error(JSON.stringify(outcome));
  return outcome.reading;
}

function judge({ series }: LogReading): Analysis {
  return analyseRun(series, {
    rating: DEFAULT_RATING,
    probe: { accuracyK: 0.5, calibrationUK: 0, correction: null, responseS: null },
    marks: [],
    load: 'empty',
    roomC: null,
    minCycles: 3,
    swingK: 4 / 1.8,
    reference: null,
  });
}

/** Wall and processor time, ms: on a busy machine the second is the steadier. */
function timed(work: () => unknown): { wallMs: number; cpuMs: number } {
  const cpu = process.cpuUsage();
  const start = performance.now();
  work();
  const wallMs = performance.now() - start;
  const used = process.cpuUsage(cpu);
  return { wallMs, cpuMs: (used.user + used.system) / 1000 };
}

function median(values: number[]): number {
  return [...values].sort((a, b) => a - b)[values.length >> 1] ?? NaN;
}

function turns({ series }: LogReading): number {
  const probe = { accuracyK: 0.5, calibrationUK: 0, correction: null, responseS: null };
  return findTurnsOnly(series, 4 / 1.8, probe).cutOuts.length;
}

function speed(): void {
  const bytes = readFileSync(file);
  const text = bytes.toString('utf8');
  const kinds = {
    'Papa.parse(text) alone': () => Papa.parse(text).data.length,
    read: () => read(bytes).temps.length,
    'read, turning points': () => turns(read(bytes)),
    'read and fully judged': () => judge(read(bytes)),
  };
  const times = new Map<string, { wallMs: number; cpuMs: number }[]>();
  for (let round = 0; round < Number(rounds); round++) {
    for (const [name, work] of Object.entries(kinds)) {
      times.set(name, [...(times.get(name) ?? []), timed(work)]);
    }
  }
  const papa = times.get('Papa.parse(text) alone')!;
  for (const [name, all] of times) {
    const wallMs = median(all.map((t) => t.wallMs));
    const cpuMs = median(all.map((t) => t.cpuMs));
    const wallRatio = wallMs / median(papa.map((t) => t.wallMs));
    const cpuRatio = cpuMs / median(papa.map((t) => t.cpuMs));
    console.log(
      `${name.padEnd(24)} ${wallMs.toFixed(0).padStart(6)} ms (${wallRatio.toFixed(2)})  processor ${cpuMs.toFixed(0).padStart(6)} ms (${cpuRatio.toFixed(2)})`,
    );
  }
}

function memory(): void {
  const highestMb = () => process.resourceUsage().maxRSS / 1024;
  const idleMb = process.memoryUsage.rss() / 1e6;
  const { cutOuts, legs, findings } = judge(read(readFileSync(file)));
  const peakMb = (highestMb() * 1024 * 1024) / 1e6;
  console.log(
    `memory: ${idleMb.toFixed(0)} MB idle, ${peakMb.toFixed(0)} MB at most, ${(peakMb - idleMb).toFixed(0)} MB over idle`,
  );
  console.log(
    `${cutOuts.length} cut-outs, ${legs.length} legs, ${findings[0]?.code ?? 'no finding'}`,
  );
}

if (mode === 'memory') memory();
else speed();
