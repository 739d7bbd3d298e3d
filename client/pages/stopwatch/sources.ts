import type { ReferenceRun } from '#shared/analysis/analysis.ts';
import type { EndSetup } from '#shared/recorder/run-event.ts';
import type { StoredCalibration } from '#shared/schemas/calibrations.ts';
import type { MachinePage } from '#shared/schemas/homes.ts';
import type { VisitPage } from '#shared/schemas/jobs.ts';
import type { Session } from '#shared/schemas/people.ts';
import type { StoredProbe } from '#shared/schemas/ratings.ts';
import { fetchJson } from '../../api/http.ts';
import { matches, type Shape } from '../../api/matches.ts';
import { readSession } from '../../device/device-session.ts';

/** What the stopwatch needs of what the server says; checked by hand, so that no schema library is loaded. */
export type StopwatchSession = {
  person: Session['person'];
  shop: Pick<Session['shop'], 'unit' | 'zone' | 'minCycles'>;
};
export type StopwatchVisit = Pick<VisitPage, 'id' | 'safetyTickedAtMs' | 'mayRecord'> & {
  job: Pick<VisitPage['job'], 'id' | 'number' | 'machine' | 'customer'>;
  runs: Pick<VisitPage['runs'][number], 'id' | 'label'>[];
};
export type StopwatchMachine = Pick<MachinePage, 'id' | 'make' | 'model' | 'fuel' | 'specified'>;

export type Sources = {
  session: StopwatchSession;
  visit: StopwatchVisit;
  machine: StopwatchMachine;
  probes: StoredProbe[];
  calibrations: StoredCalibration[];
  references: MachineReference[];
};

/** A clean run to go by, for one way of running the machine; the server made it. */
export type MachineReference = Pick<EndSetup, 'setting' | 'load' | 'duct'> & {
  reference: ReferenceRun;
  /** The run that it was made of; an older server does not say. */
  from?: { startedAtMs: number; duct: EndSetup['duct'] };
};

const MACHINE = { id: 'string', make: 'string', model: 'string', fuel: 'string' } as const;
const RATING: Shape = {
  fields: {
    ...{ id: 'string', name: 'string', unit: { oneOf: ['F', 'C'] } },
    ...{ opens: 'number', opensTol: 'number', overshoot: 'number', undershoot: 'number' },
    ...{ closes: { orNull: 'number' }, closesTol: { orNull: 'number' } },
  },
};
const SHAPES = {
  session: {
    fields: {
      person: { fields: { id: 'string', name: 'string', role: 'string' } },
      shop: { fields: { unit: { oneOf: ['F', 'C'] }, zone: 'string', minCycles: 'number' } },
    },
  },
  visit: {
    fields: {
      id: 'string',
      safetyTickedAtMs: { orNull: 'number' },
      mayRecord: 'boolean',
      job: {
        fields: {
          ...{ id: 'string', number: 'number' },
          ...{ machine: { fields: MACHINE }, customer: { fields: { name: 'string' } } },
        },
      },
      runs: [{ fields: { id: 'string', label: 'string' } }],
    },
  },
  machine: {
    fields: {
      ...MACHINE,
      specified: [{ fields: { setting: 'string', rating: RATING, limit: { orNull: RATING } } }],
    },
  },
  probes: [
    {
      fields: {
        ...{ id: 'string', name: 'string', unit: { oneOf: ['F', 'C'] }, accuracy: 'number' },
        ...{ responseS: { orNull: 'number' } },
      },
    },
  ],
  calibrations: [
    { fields: { id: 'string', probeId: 'string', madeAtMs: 'number', points: ['any'] } },
  ],
  references: [
    {
      fields: {
        ...{ setting: 'string', load: 'string', duct: 'string' },
        reference: {
          fields: {
            cycles: 'number',
            onS: 'number',
            offS: 'number',
            swingK: 'number',
            fall: 'any',
          },
        },
      },
    },
  ],
} satisfies Record<string, Shape>;

function checker<T>(isRight: (answer: unknown) => answer is T) {
  return {
    parse(answer: unknown): T {
      if (isRight(answer)) return answer;
      throw new Error('The page could not read what the shop’s server sent.');
    },
  };
}

export const sessionChecker = checker((answer): answer is StopwatchSession =>
  matches(answer, SHAPES.session),
);
export const visitChecker = checker((answer): answer is StopwatchVisit =>
  matches(answer, SHAPES.visit),
);
export const machineChecker = checker((answer): answer is StopwatchMachine =>
  matches(answer, SHAPES.machine),
);
export const probesChecker = checker((answer): answer is StoredProbe[] =>
  matches(answer, SHAPES.probes),
);
export const calibrationsChecker = checker((answer): answer is StoredCalibration[] =>
  matches(answer, SHAPES.calibrations),
);

export const referencesChecker = checker((answer): answer is MachineReference[] =>
  matches(answer, SHAPES.references),
);

/** Who is signed in, from the server or as it was last. */
export function findSession(): Promise<StopwatchSession> {
  return readSession(() => fetchJson(sessionChecker, '/api/session'), sessionChecker.parse);
}

/** The visit, its machine with what that is specified to have, and the probes. */
export async function findSources(session: StopwatchSession, visitId: string): Promise<Sources> {
  const visit = await fetchJson(visitChecker, `/api/visits/${visitId}`);
  const machineUrl = `/api/machines/${visit.job.machine.id}`;
  const [machine, probes, calibrations, references] = await Promise.all([
    fetchJson(machineChecker, machineUrl),
    orNone(fetchJson(probesChecker, '/api/probes')),
    orNone(fetchJson(calibrationsChecker, '/api/calibrations')),
    orNone(fetchJson(referencesChecker, `${machineUrl}/references`)),
  ]);
  return { session, visit, machine, probes, calibrations, references };
}

/** A list that cannot be had must not stop the work: the run then goes without its probe. */
function orNone<T>(list: Promise<T[]>): Promise<T[]> {
  return list.catch(() => []);
}
