import type { Knex } from 'knex';
import { AppError } from '#server/errors.ts';
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
    async columns(run: Run, channel: number, most: number): Promise<Column[]> {
      const unit = unitOf(run, channel);
      const folder = foldColumns(most, run);
      for await (const [timesS, temps] of samples.pairs(run.id, TEMPS + channel)) {
        folder.add(timesS, inCelsius(temps, unit));
      }
      return folder.columns();
    },

    /** All times, then all temperatures, as little-endian float64. Refuses before the first octet. */
    octets: (run: Run, channel: number) => octets(run.id, channel, unitOf(run, channel)),
  };

  async function* octets(runId: string, channel: number, unit: TemperatureUnit) {
    for await (const timesS of samples.chunks(runId, TIMES)) yield packChunk(timesS);
    for await (const temps of samples.chunks(runId, TEMPS + channel)) {
      yield packChunk(inCelsius(temps, unit));
    }
  }
}

function unitOf(run: Run, channel: number): TemperatureUnit {
  const unit = channel === 0 ? run.channelUnit : run.channels[channel - 1]?.unit;
  if (!unit) throw new AppError(400, 'no-channel', 'The run has no such channel.');
  return unit;
}

function inCelsius(temps: Float64Array, unit: TemperatureUnit): Float64Array {
  return temps.map((temp) => toCelsius(temp, unit));
}
