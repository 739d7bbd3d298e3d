import { randomUUID } from 'node:crypto';
import { notFound } from '#server/errors.ts';
import type { NewProbe, StoredProbe } from '#shared/schemas/ratings.ts';
import type { ProbeRepository } from './probe-repository.ts';

export type ProbeService = ReturnType<typeof createProbeService>;

export function createProbeService(probes: ProbeRepository) {
  return {
    list: probes.list,

    async create(asked: NewProbe): Promise<StoredProbe> {
      const probe = { ...asked, id: randomUUID() };
      await probes.insert(probe);
      return probe;
    },

    /** Runs judged before keep the uncertainty that they were judged with. */
    async change(id: string, asked: NewProbe): Promise<StoredProbe> {
      if (!(await probes.find(id))) throw notFound();
      const probe = { ...asked, id };
      await probes.update(probe);
      return probe;
    },
  };
}
