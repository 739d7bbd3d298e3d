import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { calibrationSchema, type NewCalibration } from '#shared/schemas/calibrations.ts';
import { fetchJson, postJson } from './http.ts';

/** Of all probes, in the order that they were recorded in. */
export function calibrationsQuery() {
  return queryOptions({
    queryKey: ['calibrations'],
    queryFn: ({ signal }) => fetchJson(z.array(calibrationSchema), '/api/calibrations', { signal }),
  });
}

export function useRecordCalibration(probeId: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (calibration: NewCalibration) =>
      postJson(calibrationSchema, `/api/probes/${probeId}/calibrations`, calibration),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: ['calibrations'] }),
  });
}
