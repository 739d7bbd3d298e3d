import type { JobsWiring } from '#server/wiring/wire-jobs.ts';
import type { Machine } from '#shared/schemas/homes.ts';
import type { StoredProbe, StoredRating } from '#shared/schemas/ratings.ts';
import { DEMO_HOMES, type DemoMachine } from './demo-homes.ts';
import { DEMO_SHOP } from './demo-people.ts';
import { DEMO_CALIBRATIONS, DEMO_PROBES, DEMO_RATINGS } from './demo-ratings.ts';
import { needed } from './seed-people.ts';

const DAY_MS = 86_400_000;
/** The machines were made, and last looked into, years before the first job. */
const FACTORY_MS = 900 * DAY_MS;
const SUPPLIER = 'Factory';
const FUSE = 'HL-F196';

/** By name, as the story calls them. */
export type DemoThings = {
  ratings: Map<string, StoredRating>;
  probes: Map<string, StoredProbe>;
  machines: Map<string, Machine>;
};

/** The lists of the shop, and the homes with their machines as they were before the first job. */
export async function seedHomes(jobs: JobsWiring, nowMs: number): Promise<DemoThings> {
  const ratings = new Map<string, StoredRating>();
  for (const rating of DEMO_RATINGS) {
    ratings.set(rating.name, await jobs.ratingService.create(rating));
  }
  const probes = new Map<string, StoredProbe>();
  for (const { daysAgo, ...probe } of DEMO_PROBES) {
    const calibratedAtMs = daysAgo === null ? null : nowMs - daysAgo * DAY_MS;
    probes.set(probe.name, await jobs.probeService.create({ ...probe, calibratedAtMs }));
  }
  await seedCalibrations(jobs, probes, nowMs);
  const machines = new Map<string, Machine>();
  for (const told of DEMO_HOMES) {
    const { customer: name, phone, notes, address, access } = told;
    const customer = await jobs.customerService.create({ name, phone, notes, email: '' });
    const home = await jobs.homeService.create({
      customerId: customer.id,
      address,
      town: DEMO_SHOP.town,
      accessNotes: access,
    });
    for (const machine of told.machines) {
      machines.set(
        machine.key,
        await seedMachine(jobs, ratings, { machine, homeId: home.id }, nowMs),
      );
    }
  }
  return { ratings, probes, machines };
}

async function seedMachine(
  { machineService }: JobsWiring,
  ratings: Map<string, StoredRating>,
  { machine, homeId }: { machine: DemoMachine; homeId: string },
  nowMs: number,
): Promise<Machine> {
  const { made, thermostat, specified } = machine;
  const ratingId = (name: string) => needed(ratings.get(name), name).id;
  const created = await machineService.create({ ...made, homeId });
  await machineService.specify(created.id, {
    setting: 'high',
    ratingId: ratingId(specified),
    limitRatingId: ratingId(FUSE),
  });
  for (const part of [thermostat, FUSE]) {
    await machineService.fit(created.id, {
      ratingId: ratingId(part),
      visitId: null,
      fittedAtMs: nowMs - FACTORY_MS,
      supplier: SUPPLIER,
      lot: '',
    });
  }
  return created;
}

async function seedCalibrations(
  jobs: JobsWiring,
  probes: DemoThings['probes'],
  nowMs: number,
): Promise<void> {
  for (const { probe, daysAgo, calibration } of DEMO_CALIBRATIONS) {
    const { id } = needed(probes.get(probe), probe);
    const madeAtMs = nowMs - daysAgo * DAY_MS;
    await jobs.probeService.calibrate(id, { ...calibration, madeAtMs });
  }
}
