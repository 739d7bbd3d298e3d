import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { pyramidOfColumns } from '../../chart/pyramid-of-columns.ts';
import { buildPyramid, type Pyramid } from '../../chart/pyramid.ts';
import type { RunPage } from '#shared/schemas/runs.ts';
import { samplesQuery, traceQuery } from '../../api/runs.ts';

/** Up to here every reading is fetched in the background; 20 MB on the way. */
const MOST_SAMPLES = 1_200_000;
/** Beyond, the columns are finer instead. */
const FINE_COLUMNS = 20_000;

/** The coarse level first, then every reading. */
export function useRunReadings(run: RunPage) {
  const isHuge = run.samples > MOST_SAMPLES;
  const gaps = run.analysis.analysis.gaps;
  const coarse = useQuery(traceQuery(run.id));
  const finer = useQuery({
    ...traceQuery(run.id, FINE_COLUMNS),
    enabled: isHuge && coarse.isSuccess,
  });
  const samples = useQuery({ ...samplesQuery(run.id), enabled: !isHuge && coarse.isSuccess });
  const columns = finer.data ?? coarse.data;

  const pyramid = useMemo((): Pyramid | null => {
    if (samples.data) return buildPyramid(samples.data.timesS, samples.data.tempsC, gaps);
    return columns ? pyramidOfColumns(columns, gaps) : null;
  }, [samples.data, columns, gaps]);

  return {
    pyramid,
    hasAllReadings: samples.data !== undefined,
    error: coarse.error ?? samples.error,
    retry: () => (coarse.isError ? coarse.refetch() : samples.refetch()),
  };
}
