import { expect, test } from 'vitest';
import { createLiveDesk } from '#client/pages/stopwatch/live/create-live-desk.ts';
import { probeTrouble } from '#client/pages/stopwatch/live/probe-words.ts';
import { beginRun, openRecorder } from '#client/pages/stopwatch/recorder.ts';
import { lastToTakeBack } from '#shared/recorder/replay-run.ts';
import type { RunEvent } from '#shared/recorder/run-event.ts';
import { FakeBluetoothDevice, FakeCharacteristic } from '../device/live/fake-bluetooth.ts';
import { FakePort, FakeSerial } from '../device/live/fake-serial.ts';
import { handClock, settled } from '../device/live/hand-clock.ts';
import { NEW_RUN } from './new-run.ts';

const ESS = 0x181a;
const END = { ...NEW_RUN.setup, placement: 'x', duct: 'on', load: 'empty' } as const;

function steps(tempC: number): DataView {
  const value = new DataView(new ArrayBuffer(2));
  value.setInt16(0, Math.round(tempC * 100), true);
  return value;
}

/** A phone with a run on it that follows a probe near it. */
async function aRun(unit: 'F' | 'C' = 'F') {
  const clock = handClock();
  const kept: RunEvent[] = [];
  let ids = 0;
  const parts = {
    keep: (event: RunEvent) => Promise.resolve(void kept.push(event)),
    newId: () => `id${ids++}`,
    now: () => ({ monoMs: clock.nowMs(), wallMs: 1_800_000_000_000 + clock.nowMs() }),
    guardSetup: () => ({
      rating: null,
      probe: { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null },
    }),
  };
  const start = await beginRun(parts, { ...NEW_RUN, unit }, clock.nowMs());
  const recorder = openRecorder(parts, [start], true);
  const temperature = new FakeCharacteristic({ notify: true }, steps(20));
  const device = new FakeBluetoothDevice({ [ESS]: [temperature] });
  const desk = createLiveDesk({ requestDevice: () => Promise.resolve(device) }, null, clock.parts);
  desk.follow(recorder);
  await desk.byBluetooth();
  await settled();
  async function say(tempC: number, afterMs = 1_000): Promise<void> {
    await clock.pass(afterMs);
    temperature.call(steps(tempC));
    await recorder.settled();
  }
  const run = () => recorder.recording().run;
  return { clock, kept, parts, recorder, device, desk, say, run, temperature };
}

test('what the probe says is on the device before it is in the run, at the moment that it came', async () => {
  const { temperature, clock, run, kept, recorder } = await aRun();
  await clock.pass(1_234);
  temperature.call(steps(68.25));
  const before = run().readings.length;
  await recorder.settled();

  expect(before).toBe(0);
  expect(kept.at(-1)).toMatchObject({
    ...{ kind: 'reading', from: 'probe', atS: 1.234, temp: 154.85 },
    measured: { temp: 68.25, unit: 'C' },
  });
  expect(run().readings).toMatchObject([{ atS: 1.234, temp: 154.85 }]);
});

test('of a probe that speaks ten times a second, one reading a second is kept', async () => {
  const { say, run } = await aRun();
  for (let i = 0; i < 100; i++) await say(60 + i / 100, 100);

  const steps = run()
    .readings.slice(1)
    .map(({ atS }, i) => atS - run().readings[i]!.atS);
  expect(run().readings.length).toBeGreaterThanOrEqual(10);
  expect(Math.min(...steps)).toBeGreaterThanOrEqual(0.9);
});

test('a lost link is a gap from the last reading to the next, with what was read by hand in it', async () => {
  const { say, run, device, clock, recorder } = await aRun();
  for (let i = 0; i < 5; i++) await say(60 + i);
  device.isNear = false;
  device.tear();
  await clock.pass(20_000);
  await recorder.read(150, recorder.at());
  device.isNear = true;
  await clock.pass(15_000);
  await say(70);

  expect(run().probeGaps).toEqual([{ fromS: 5, toS: 41 }]);
  expect(run().readings.map(({ from }) => from)).toEqual([
    ...['probe', 'probe', 'probe', 'probe', 'probe'],
    ...['hand', 'probe'],
  ]);
});

test('a gap that is open when the run ends is written down before its end, and nothing comes after', async () => {
  const { say, run, device, clock, recorder, kept } = await aRun();
  for (let i = 0; i < 5; i++) await say(60 + i);
  device.isNear = false;
  device.tear();
  await clock.pass(30_000);
  await recorder.end('Run 1', END);
  device.isNear = true;
  await clock.pass(15_000);
  await say(70);

  expect(kept.slice(-2).map(({ kind }) => kind)).toEqual(['probe-gap', 'end']);
  expect(run().probeGaps).toEqual([{ fromS: 5, toS: 35 }]);
});

test('after a reload the gap begins at the last reading of before', async () => {
  const { say, parts, kept, clock } = await aRun();
  for (let i = 0; i < 5; i++) await say(60 + i);
  await clock.pass(10_000);

  const again = openRecorder(parts, kept, false);
  const { run } = again.recording();
  const empty = { probe: null, latest: null, problem: null, isLetGo: false };
  const words = probeTrouble(empty, run, again.at());
  await again.readLive({ temp: 70, unit: 'C' }, again.at());

  expect(words).toMatchObject({
    words: 'Probe lost 0:10 ago. Readings by hand go on counting.',
    does: { act: 'reconnect' },
  });
  expect(again.recording().run.probeGaps).toEqual([{ fromS: 5, toS: 15 }]);
});

test('a value that the probe does not know, or that can be none, is a gap and not a reading', async () => {
  const { say, run, temperature, clock, desk } = await aRun();
  for (let i = 0; i < 5; i++) await say(60 + i);
  for (let i = 0; i < 8; i++) {
    await clock.pass(1_000);
    temperature.call(steps(-327.68));
  }
  const words = probeTrouble(desk.view(), run(), 13);
  await say(66);

  expect(words?.words).toContain('The probe says that it knows no temperature');
  expect(run().readings).toHaveLength(6);
  expect(run().probeGaps).toEqual([{ fromS: 5, toS: 14 }]);
});

test('the guard heeds the probe: a climb without a cut-out says cut the heat before 196 °F', async () => {
  const { say, run, recorder } = await aRun();
  let tempC = 60;
  while (tempC < 91 && recorder.recording().guard.state.says !== 'cut-heat') {
    tempC += 0.4;
    await say(tempC);
  }
  await recorder.settled();

  // 196 °F is 91.1 °C.
  expect(tempC).toBeLessThan(91);
  expect(run().guard.map(({ says }) => says)).toContain('cut-heat');
});

test('Undo takes back what a person did, not what the probe said since', async () => {
  const { say, recorder, run } = await aRun();
  await say(60);
  await recorder.mark('click', recorder.at());
  await say(61);
  await recorder.undo();
  await recorder.settled();

  expect(run().marks).toEqual([]);
  expect(run().readings).toHaveLength(2);
  expect(lastToTakeBack(recorder.recording().events)).toBeNull();
});

test('a cable that was granted before is read again after a reload without being chosen', async () => {
  const serial = new FakeSerial();
  const port = new FakePort();
  serial.ports = [port];
  const clock = handClock();
  const desk = createLiveDesk(null, serial, clock.parts);
  await desk.reconnect();
  await settled();
  port.say('cut\n154.2 F\n');
  await settled();

  expect(desk.view().latest).toMatchObject({ temp: 154.2, unit: 'F' });
});

test('a list that was closed without choosing is told, and the next press asks again', async () => {
  const desk = createLiveDesk(null, new FakeSerial(), handClock().parts);
  await desk.byCable(9_600);

  expect(desk.view()).toMatchObject({
    probe: null,
    problem: expect.stringContaining('No probe was chosen'),
  });
});

test('a probe that was let go of is no loss', async () => {
  const { say, desk, run } = await aRun();
  await say(60);
  desk.letGo();

  expect(probeTrouble(desk.view(), run(), 100)).toBeNull();
});
