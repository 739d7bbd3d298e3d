import { expect, test } from 'vitest';
import { beginRun, openRecorder } from '#client/pages/stopwatch/recorder.ts';
import type { RunEvent } from '#shared/recorder/run-event.ts';
import { NEW_RUN } from './new-run.ts';

/** A phone whose store and clocks the test holds in its hand. */
function aPhone() {
  let ids = 0;
  let monoMs = 1_000;
  let wallMs = 1_800_000_000_000;
  let isFull = false;
  const kept: RunEvent[] = [];
  const parts = {
    keep: (event: RunEvent) =>
      isFull ? Promise.reject(new Error('No room left.')) : Promise.resolve(void kept.push(event)),
    newId: () => `id${ids++}`,
    now: () => ({ monoMs, wallMs }),
    guardSetup: () => ({
      rating: null,
      probe: { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null },
    }),
  };
  return {
    parts,
    kept,
    fill: (full: boolean) => (isFull = full),
    pass(ms: number, setMs = 0) {
      monoMs += ms;
      wallMs += ms + setMs;
    },
    /** The page is gone for so long; its monotonic clock begins anew. */
    reopen(ms: number) {
      wallMs += ms;
      monoMs = 50;
    },
    monoMs: () => monoMs,
  };
}

async function begun(phone: ReturnType<typeof aPhone>) {
  const start = await beginRun(phone.parts, NEW_RUN, phone.monoMs());
  return openRecorder(phone.parts, [start], true);
}

test('a reading is on the screen only once it is kept, stamped with the finger going down', async () => {
  const phone = aPhone();
  const recorder = await begun(phone);
  phone.pass(10_000);
  const downAtS = recorder.at(phone.monoMs());
  phone.pass(700);

  const keeping = recorder.read(141, downAtS);
  const before = recorder.recording().run.readings.length;
  await keeping;

  expect(before).toBe(0);
  expect(recorder.recording().run.readings).toMatchObject([{ temp: 141, atS: 10 }]);
  expect(phone.kept.map(({ kind }) => kind)).toEqual(['start', 'reading']);
});

test('what could not be kept is not shown, says why, and leaves no hole', async () => {
  const phone = aPhone();
  const recorder = await begun(phone);
  phone.pass(10_000);
  phone.fill(true);
  const isKept = await recorder.read(141, 10);

  expect(isKept).toBe(false);
  expect(recorder.recording()).toMatchObject({ problem: 'No room left.', run: { readings: [] } });

  phone.fill(false);
  await recorder.read(142, 11);

  expect(recorder.recording().problem).toBeNull();
  expect(phone.kept.map(({ n }) => n)).toEqual([0, 1]);
});

test('nothing follows the end of a run', async () => {
  const phone = aPhone();
  const recorder = await begun(phone);
  const setup = { ...NEW_RUN.setup, placement: 'Outlet', duct: 'on', load: 'empty' } as const;
  await recorder.end('As found', setup);

  expect(await recorder.read(150, recorder.at())).toBe(false);
  expect(phone.kept.at(-1)?.kind).toBe('end');
});

test('an hour with the page gone is an hour, marked as the phone’s clock', async () => {
  const phone = aPhone();
  const first = await begun(phone);
  phone.pass(600_000);
  await first.read(150, first.at());
  phone.reopen(3_000_000);

  const again = openRecorder(phone.parts, phone.kept, false);
  again.noteReopened();
  await again.settled();

  expect(again.at()).toBeCloseTo(3600, 3);
  expect(again.recording().run.clock).toMatchObject([{ fromS: 600, check: 'unchecked' }]);
  expect(again.recording().run.readings).toHaveLength(1);
});

test('time goes on right where the last thing was kept long after its first key was touched', async () => {
  const phone = aPhone();
  const first = await begun(phone);
  phone.pass(60_000);
  const downAtS = first.at();
  phone.pass(20_000);
  await first.mark('note', downAtS, 'Lint on the hood');
  phone.reopen(40_000);

  const again = openRecorder(phone.parts, phone.kept, false);

  expect(again.at()).toBeCloseTo(120, 6);
});

test('the phone’s clock set by an hour is flagged and not added', async () => {
  const phone = aPhone();
  const recorder = await begun(phone);
  phone.pass(5_000, 3_600_000);
  recorder.compare(true);
  await recorder.settled();

  expect(recorder.at()).toBe(5);
  expect(recorder.recording().run.steps).toEqual([{ atS: 5, stepS: 3600 }]);
});

test('what the guard begins to say is kept with the run', async () => {
  const phone = aPhone();
  const recorder = await begun(phone);
  for (let i = 0; i < 16; i++) await recorder.read(100 + 6 * i, 10 * (i + 1));
  await recorder.settled();

  const said = recorder.recording().run.guard.map(({ says }) => says);
  expect(said).toContain('cut-heat');

  await recorder.mark('heat-off', 161);
  for (let i = 0; i < 6; i++) await recorder.read(180 - 8 * i, 170 + 10 * i);
  await recorder.settled();

  expect(recorder.recording().run.guard.at(-1)?.says).toBe('quiet');
});

test('Undo right after a mark takes that back, though it is still being kept', async () => {
  const recorder = await begun(aPhone());
  await recorder.read(141, 10);

  void recorder.mark('click', 11);
  await recorder.undo();

  const { run } = recorder.recording();
  expect(run.marks).toEqual([]);
  expect(run.readings).toHaveLength(1);
});
