import { randomUUID } from 'node:crypto';
import { fieldFault, notFound } from '#server/errors.ts';
import { classesOf } from '#shared/probes/probe-class.ts';
import { sensorOf } from '#shared/probes/sensor-of.ts';
import type { NewCalibration, StoredCalibration } from '#shared/schemas/calibrations.ts';
import type { NewProbe, StoredProbe } from '#shared/schemas/ratings.ts';
import type { CalibrationRepository } from './calibration-repository.ts';
import type { ProbeRepository } from './probe-repository.ts';

export type ProbeService = ReturnType<typeof createProbeService>;

/** A day's noon in a zone ahead of ours is no day to come. */
const HALF_DAY_MS = 12 * 3600_000;

export function createProbeService(
  probes: ProbeRepository,
  calibrations: CalibrationRepository,
  now: () => Date,
) {
  return {
    list: probes.list,
    listCalibrations: calibrations.list,

    async create(asked: NewProbe): Promise<StoredProbe> {
      refuseStrangeClass(asked);
      const probe = { ...asked, id: randomUUID() };
      await probes.insert(probe);
      return probe;
    },

    /** Runs judged before keep the uncertainty that they were judged with. */
    async change(id: string, asked: NewProbe): Promise<StoredProbe> {
      if (!(await probes.find(id))) throw notFound();
      refuseStrangeClass(asked);
      const probe = { ...asked, id };
      await probes.update(probe);
      return probe;
    },

    /** Earlier ones stay; runs judged before keep the one that they were judged with. */
    async calibrate(probeId: string, asked: NewCalibration): Promise<StoredCalibration> {
      if (!(await probes.find(probeId))) throw notFound();
      const nowMs = now().getTime();
      if (asked.madeAtMs > nowMs + HALF_DAY_MS) {
        throw fieldFault('madeAtMs', 'Enter a day that has come');
      }
      // Which of a day is the last is told by time alone.
      const last = (await calibrations.listOf(probeId)).at(-1);
      const recordedAtMs = Math.max(nowMs, (last?.recordedAtMs ?? 0) + 1);
      const calibration = { ...asked, id: randomUUID(), probeId, recordedAtMs };
      await calibrations.insert(calibration);
      return calibration;
    },
  };
}

function refuseStrangeClass({ kind, accuracyClass }: NewProbe): void {
  if (accuracyClass === null) return;
  const sensor = sensorOf(kind);
  if (sensor && classesOf(sensor).includes(accuracyClass)) return;
  throw fieldFault('accuracyClass', 'Choose a class of this kind of probe');
}
