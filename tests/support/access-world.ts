import type { World } from '../server/access-cases.ts';
import { bookVisit } from './booked-visit.ts';
import { cyclingLog } from './cycling-log.ts';
import { makeRun, sendLog } from './send-log.ts';
import type { TestApp } from './test-app.ts';

/** One of everything, of one technician's visit; and a second technician with a visit, run and link elsewhere. */
export async function buildAccessWorld(app: TestApp) {
  const owner = await app.agent('owner');
  const office = await app.agent('office');
  const own = await app.agent('technician');
  const other = await app.agent('technician');
  const someone = await app.agent('technician');

  const { visit, machine, rating } = await bookVisit(owner, own);
  const elsewhere = await bookVisit(owner, other);
  const runId = await makeRun(own, visit.id, cyclingLog());
  const otherRunId = await makeRun(other, elsewhere.visit.id, cyclingLog());
  const upload = await sendLog(own, visit.id, cyclingLog());
  const share = (await owner.post(`/api/runs/${runId}/shares`).send({ days: 7 })).body;
  const otherShare = (await owner.post(`/api/runs/${otherRunId}/shares`).send({ days: 7 })).body;
  const home = (await owner.get(`/api/homes/${machine.homeId}`)).body;
  const probe = await owner.post('/api/probes').send(PROBE);

  const world: World = {
    owner,
    own,
    visitId: visit.id,
    jobId: visit.jobId,
    machine,
    customerId: home.customerId,
    ratingId: rating.id,
    probeId: probe.body.id,
    someoneId: someone.person.id,
    runId,
    uploadId: upload.id,
    shareId: share.id,
    token: tokenOf(share.url),
  };
  return { world, office, other, otherRunId, otherToken: tokenOf(otherShare.url) };
}

const PROBE = {
  name: 'Red lead',
  kind: 'thermocouple-k',
  unit: 'F',
  accuracyClass: null,
  accuracy: 2,
  responseS: 3,
  calibrationU: null,
  calibratedAtMs: null,
  notes: '',
};

function tokenOf(url: string): string {
  return new URL(url).hash.slice(1);
}
