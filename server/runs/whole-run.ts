import type { Series } from '#shared/analysis/series.ts';
import { toCelsius } from '#shared/units.ts';
import type { Run } from './run.ts';
import { TEMPS, type SampleRepository } from './sample-repository.ts';

/** A run's series, °C, gathered chunk by chunk. */
export async function readWholeRun(samples: SampleRepository, run: Run): Promise<Series> {
  const timesS = new Float64Array(run.samples);
  const tempsC = new Float64Array(run.samples);
  let at = 0;
  for await (const [times, temps] of samples.pairs(run.id, TEMPS)) {
    timesS.set(times, at);
    tempsC.set(
      temps.map((temp) => toCelsius(temp, run.channelUnit)),
      at,
    );
    at += times.length;
  }
  return { timesS, tempsC };
}
