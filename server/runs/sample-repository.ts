import { setImmediate as nextTurn } from 'node:timers/promises';
import type { Knex } from 'knex';
import { unpackChunk } from './pack-samples.ts';

type SampleRow = {
  run_id: string;
  channel: number;
  chunk: number;
  samples: number;
  packed: Uint8Array;
};

/** Place of the times among a run's packed arrays; its temperatures are 1, further channels follow. */
export const TIMES = 0;
export const TEMPS = 1;

export type SampleRepository = ReturnType<typeof createSampleRepository>;

/** A run's readings, as recorded. They go in and out chunk by chunk, so that other requests get their turn. */
export function createSampleRepository(db: Knex) {
  async function findChunk(runId: string, channel: number, chunk: number) {
    const row = await db<SampleRow>('run_samples').where({ run_id: runId, channel, chunk }).first();
    return row && unpackChunk(row.packed);
  }

  return {
    async insert(runId: string, channel: number, chunks: Uint8Array[]): Promise<void> {
      for (const [chunk, packed] of chunks.entries()) {
        const samples = packed.byteLength / Float64Array.BYTES_PER_ELEMENT;
        // The driver binds a Buffer; this one looks at the same octets.
        const octets = Buffer.from(packed.buffer, packed.byteOffset, packed.byteLength);
        await db<SampleRow>('run_samples').insert({
          run_id: runId,
          channel,
          chunk,
          samples,
          packed: octets,
        });
        await nextTurn();
      }
    },

    /** Takes back the readings of a run that did not come to be. */
    async remove(runId: string): Promise<void> {
      await db<SampleRow>('run_samples').where({ run_id: runId }).delete();
    },

    /** What a crash left of runs that did not come to be. */
    async sweep(): Promise<void> {
      await db<SampleRow>('run_samples').whereNotIn('run_id', db('runs').select('id')).delete();
    },

    /** One channel, chunk after chunk. */
    async *chunks(runId: string, channel: number): AsyncGenerator<Float64Array> {
      for (let chunk = 0; ; chunk++) {
        const values = await findChunk(runId, channel, chunk);
        if (!values) return;
        yield values;
      }
    },

    /** Times and one channel side by side, chunk after chunk. */
    async *pairs(runId: string, channel: number): AsyncGenerator<[Float64Array, Float64Array]> {
      for (let chunk = 0; ; chunk++) {
        const timesS = await findChunk(runId, TIMES, chunk);
        const temps = timesS && (await findChunk(runId, channel, chunk));
        if (!timesS || !temps) return;
        yield [timesS, temps];
      }
    },
  };
}
