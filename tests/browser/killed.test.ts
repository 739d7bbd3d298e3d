import { beginBadDay, closeBadLine, openBadLine, type BadLine } from './support/bad-day.ts';
import { playBadSchedule } from './support/bad-schedule.ts';
import { ownServer } from './support/own-server.ts';
import { storeOf } from './support/phone.ts';
import { PATIENTLY, readingsShown } from './support/run-by-keys.ts';
import { eventsOnDevice } from './support/true-time.ts';
import { expect, test } from './support/watched-test.ts';

let line: BadLine;

test.beforeAll(async () => {
  const server = await ownServer();
  await server.start();
  line = await openBadLine(server);
});

test.afterAll(() => closeBadLine(line));

const visitOf = (n: number) => line.visits[n % line.visits.length] ?? '';

test('a browser killed in mid-run, out of reach of the server, goes on with the run, and all of it is sent once', async () => {
  const day = await beginBadDay(line, visitOf(0));
  try {
    await day.read(true);
    await expect.poll(() => clockSays(day.page()), PATIENTLY).toBe('clock-check');
    await day.serverDown();
    await day.read(true);
    const before = performance.now();
    const secondsBefore = await elapsed(day.page());

    await day.kill(await day.typeInHaste(0));

    const passedS = (performance.now() - before) / 1000;
    expect(Math.abs((await elapsed(day.page())) - secondsBefore - passedS)).toBeLessThan(2);
    await day.read(true);
    await day.kill(await day.typeInHaste(1));
    await day.read(false);
    await day.serverUp();
    // An answer that took long says nothing of the server's clock; the next one comes with the next reading.
    await day.lookAway();
    await expect
      .poll(async () => {
        await day.read(false);
        return clockSays(day.page());
      }, PATIENTLY)
      .toBe('clock-check');
    const { runId, ...verdict } = await day.end(false);
    expect(verdict).toMatchObject({ lost: [], doubled: [], problems: [] });
    const told = (await line.record.warningsOf(runId)).filter((words) =>
      /phone’s clock/.test(words),
    );
    // Once for each time that the page was gone.
    expect(told).toHaveLength(2);
    for (const words of told) expect(words).toMatch(PHONE_CLOCK);
  } finally {
    await day.close();
    await day.serverUp();
  }
});

test('a server killed between doing and answering gets nothing twice from a page that sends again by itself', async () => {
  const day = await beginBadDay(line, visitOf(1));
  try {
    await day.read(true);
    await expect.poll(() => unsent(day.page()), PATIENTLY).toBe(0);
    const before = line.relay.met.length;
    day.meets({ is: 'killed-answering' });
    await day.read(true);
    await expect.poll(() => line.server.isUp(), PATIENTLY).toBe(false);
    expect(line.record.linesOf(visitOf(1)).at(-1)?.event).toContain('"reading"');
    expect(await unsent(day.page())).toBeGreaterThan(0);

    await day.serverUp();
    await day.read(true);
    await expect.poll(() => unsent(day.page()), PATIENTLY).toBe(0);

    expect(line.relay.met.slice(before)[0]).toBe('killed-answering');
    expect(await readingsShown(day.page())).toBe(3);
    expect(await day.end(false)).toMatchObject({ lost: [], doubled: [], problems: [] });
  } finally {
    await day.close();
  }
});

// `npm run bench -- schedules 200 1001` plays two hundred.
for (const seed of [1, 10, 12]) {
  test(`nothing is lost or doubled on bad day ${seed}`, async () => {
    const played = await playBadSchedule(line, seed);

    expect(played).toMatchObject({ lost: [], doubled: [], problems: [] });
    expect(played.shown).toBeGreaterThanOrEqual(4);
  });
}

/** The server was reached before and after. */
const PHONE_CLOCK =
  /^From \d:\d\d to \d:\d\d time is from the phone’s clock; the server’s clock agrees\.$/;

type Page = ReturnType<Awaited<ReturnType<typeof beginBadDay>>['page']>;

/** What the clock on the screen says, s. */
async function elapsed(page: Page): Promise<number> {
  const [minutes = NaN, seconds = NaN] = (await page.getByRole('timer').innerText())
    .split(':')
    .map(Number);
  return minutes * 60 + seconds;
}

/** What was written of the clocks last. */
async function clockSays(page: Page): Promise<unknown> {
  const kinds = (await eventsOnDevice(page)).map(({ kind }) => kind);
  return kinds.findLast((kind) => kind === 'asleep' || kind === 'clock-check');
}

async function unsent(page: Page): Promise<number> {
  const things = await storeOf(page, 'things');
  return things.filter((thing) => Reflect.get(thing, 'state') === 'unsent').length;
}
