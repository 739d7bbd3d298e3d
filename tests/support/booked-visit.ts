import type { Machine, NewMachine } from '#shared/schemas/homes.ts';
import type { Visit } from '#shared/schemas/jobs.ts';
import type { NewRating, StoredRating } from '#shared/schemas/ratings.ts';
import { NOW, type Agent } from './test-app.ts';

export const THERMOSTAT_155: NewRating = {
  kind: 'cycling-thermostat',
  name: 'HL-T155',
  unit: 'F',
  opens: 155,
  opensTol: 5,
  closes: 130,
  closesTol: 5,
  overshoot: 10,
  undershoot: 10,
};

const MACHINE: Omit<NewMachine, 'homeId'> = {
  make: 'Calder',
  model: 'C40',
  serial: 'C40-0117',
  fuel: 'electric',
  control: 'thermostat',
  ratedVolts: 240,
  ratedWatts: 5600,
  place: 'Basement',
};

export type BookedVisit = { visit: Visit; machine: Machine; rating: StoredRating };

/** A visit of `technician` to a machine with a 155/130 °F thermostat, laid out by the owner through the API. */
export async function bookVisit(owner: Agent, technician: Agent): Promise<BookedVisit> {
  const send = async (method: 'post' | 'put', path: string, body: object) => {
    const answer = await owner[method](path).send(body);
    if (answer.status >= 300) throw new Error(`${path}: ${answer.status} ${answer.text}`);
    return answer.body;
  };
  const person = { name: 'Oona Marsh', phone: '555-0142', email: '', notes: '' };
  const customer = await send('post', '/api/customers', person);
  const address = { address: '4 Sill Lane', town: 'Tessford', accessNotes: '' };
  const home = await send('post', '/api/homes', { ...address, customerId: customer.id });
  const machine = await send('post', '/api/machines', { ...MACHINE, homeId: home.id });
  const rating = await send('post', '/api/ratings', THERMOSTAT_155);
  await send('put', `/api/machines/${machine.id}/specified`, {
    setting: 'high',
    ratingId: rating.id,
    limitRatingId: null,
  });
  const complaint = { complaint: 'It keeps stopping', callsBackJobId: null };
  const job = await send('post', '/api/jobs', { ...complaint, machineId: machine.id });
  const visit = await send('post', `/api/jobs/${job.id}/visits`, {
    technicianId: technician.person.id,
    startsAtMs: NOW.getTime() - 3_600_000,
    endsAtMs: NOW.getTime() + 3_600_000,
    notes: '',
  });
  return { visit, machine, rating };
}
