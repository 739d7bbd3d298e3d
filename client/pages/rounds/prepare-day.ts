import type { QueryClient } from '@tanstack/react-query';
import type { Rounds } from '#shared/schemas/jobs.ts';
import { jobQuery } from '../../api/jobs.ts';
import { machineQuery, machineReferencesQuery, machineRunsQuery } from '../../api/machines.ts';
import { calibrationsQuery } from '../../api/calibrations.ts';
import { probesQuery } from '../../api/probes.ts';
import { ratingsQuery } from '../../api/ratings.ts';
import { runQuery, traceQuery } from '../../api/runs.ts';
import { visitQuery } from '../../api/visits.ts';

/** What was asked for within ten minutes is not asked for again. */
const QUIET = { staleTime: 10 * 60_000, retry: false };
/** Runs of a machine that are fetched whole; all of them come as cards. */
const WHOLE_RUNS = 2;

/** Visits, machines, their runs, ratings and probes, one after the other. */
export async function prepareDay(
  queryClient: QueryClient,
  visits: Rounds['visits'],
  stop: AbortSignal,
) {
  const common = [
    () => queryClient.prefetchQuery({ ...ratingsQuery(), ...QUIET }),
    () => queryClient.prefetchQuery({ ...probesQuery(), ...QUIET }),
    () => queryClient.prefetchQuery({ ...calibrationsQuery(), ...QUIET }),
  ];
  for (const lay of [...common, ...visits.map((visit) => () => prepareVisit(queryClient, visit))]) {
    if (!stop.aborted) await lay();
  }
}

async function prepareVisit(queryClient: QueryClient, { id, job }: Rounds['visits'][number]) {
  const machineId = job.machine.id;
  await queryClient.prefetchQuery({ ...visitQuery(id), ...QUIET });
  await queryClient.prefetchQuery({ ...machineQuery(machineId), ...QUIET });
  await queryClient.prefetchQuery({ ...machineRunsQuery(machineId), ...QUIET });
  await queryClient.prefetchQuery({ ...machineReferencesQuery(machineId), ...QUIET });
  if (job.callsBack) await queryClient.prefetchQuery({ ...jobQuery(job.callsBack.id), ...QUIET });
  const runs = queryClient.getQueryData(machineRunsQuery(machineId).queryKey) ?? [];
  for (const run of runs.slice(0, WHOLE_RUNS)) {
    await queryClient.prefetchQuery({ ...runQuery(run.id), ...QUIET });
    await queryClient.prefetchQuery({ ...traceQuery(run.id), ...QUIET });
  }
}
