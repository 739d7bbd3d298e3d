import type { Knex } from 'knex';
import { AppError } from '#server/errors.ts';
import { correctionAt } from '#shared/analysis/correct-series.ts';
import type { ProbeCorrection } from '#shared/analysis/rating.ts';
import { toCelsius, type TemperatureUnit } from '#shared/units.ts';
import { foldColumns, type Column } from './fold-columns.ts';
import { packChunk } from './pack-samples.ts';
import type { Run } from './run.ts';
import { createSampleRepository, TEMPS, TIMES } from './sample-repository.ts';

export type RunReadings = ReturnType<typeof createRunReadings>;

/** A run's readings as pages draw them, in °C. They go through memory chunk by chunk, never whole. */
export function createRunReadings(db: Knex) {
  const samples = createSampleRepository(db);

  return {
    /** At most `most` columns; every reading lies in exactly one. @param channel 0 is the run's own */
    async columns(run: Run, channel: number, most: number, by: Correction): Promise<Column[]> {
      const toC = asJudged(run, channel, by);
      const folder = foldColumns(most, run);
      for await (const [timesS, temps] of samples.pairs(run.id, TEMPS + channel)) {
        folder.add(timesS, temps.map(toC));
      }
      return folder.columns();
    },

    /** All times, then all temperatures, as little-endian float64. Refuses before the first octet. */
    octets: (run: Run, channel: number, by: Correction) =>
      octets(run.id, channel, asJudged(run, channel, by)),
  };

  async function* octets(runId: string, channel: number, toC: (temp: number) => number) {
    for await (const timesS of samples.chunks(runId, TIMES)) yield packChunk(timesS);
    for await (const temps of samples.chunks(runId, TEMPS + channel)) {
      yield packChunk(temps.map(toC));
    }
  }
}

/** Of the probe, by the result that the readings are shown beside; null where it has none. */
type Correction = ProbeCorrection | null;

/** As recorded, in °C, and corrected where the run's own probe was: so that points lie on the trace. */
function asJudged(run: Run, channel: number, correction: Correction): (temp: number) => number {
  const unit = unitOf(run, channel);
  if (!correction || channel !== 0) return (temp) => toCelsius(temp, unit);
  return (temp) => {
    const tempC = toCelsius(temp, unit);
    return tempC + correctionAt(correction, tempC);
  };
}

function unitOf(run: Run, channel: number): TemperatureUnit {
  const unit = channel === 0 ? run.channelUnit : run.channels[channel - 1]?.unit;
  if (!unit) throw new AppError(400, 'no-channel', 'The run has no such channel.');
  return unit;
}
