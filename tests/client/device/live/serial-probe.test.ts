import { expect, test } from 'vitest';
import type { LiveReading } from '#client/device/live/live-probe.ts';
import { serialProbe } from '#client/device/live/serial-probe.ts';
import { FakePort, FakeSerial } from './fake-serial.ts';
import { handClock, settled } from './hand-clock.ts';

/** The line that was under way when the port was opened. */
const CUT = '4.1 F\n';

async function linked() {
  const serial = new FakeSerial();
  const port = new FakePort();
  const clock = handClock();
  const probe = serialProbe(serial, port, 9_600, clock.parts);
  const readings: LiveReading[] = [];
  probe.onReading((reading) => readings.push(reading));
  await settled();
  async function say(text: string | Uint8Array, on = port): Promise<void> {
    on.say(text);
    await settled();
  }
  const temps = () => readings.map(({ temp }) => temp);
  await say(CUT);
  return { serial, port, clock, probe, readings, say, temps, is: () => probe.state().is };
}

test('lines are readings when they end, wherever the pieces end', async () => {
  const { say, port, clock, readings, is } = await linked();
  await say('T=154.2 F\r\nT=15');
  await clock.pass(500);
  await say('4.6 F\r');
  await say('\n');

  expect(port.speeds).toEqual([9_600]);
  expect(is()).toBe('reading');
  expect(readings).toEqual([
    { temp: 154.2, unit: 'F', monoMs: 1000 },
    { temp: 154.6, unit: 'F', monoMs: 1500 },
  ]);
});

test('the end of a line that was under way when the port was opened is no reading', async () => {
  const { readings, probe } = await linked();

  expect(readings).toEqual([]);
  expect(probe.silence().count).toBe(0);
});

test('a degree sign that a piece cuts in two is one', async () => {
  const { say, readings } = await linked();
  const octets = new TextEncoder().encode('68.25 °C\n');
  const cut = octets.indexOf(0xc2) + 1;
  await say(octets.slice(0, cut));
  await say(octets.slice(cut));

  expect(readings).toMatchObject([{ temp: 68.25, unit: 'C' }]);
});

test('a number without a unit is asked about once; until then there is no reading', async () => {
  const { say, probe, readings } = await linked();
  await say('154.2\n154.3\n');
  const asked = probe.state();
  const before = readings.length;
  probe.answer('F');
  await say('154.4\n');

  expect(asked).toMatchObject({
    is: 'asks',
    question: { options: [{ key: 'F', words: '°F' }, { key: 'C' }] },
  });
  expect(before).toBe(0);
  expect(readings).toMatchObject([{ temp: 154.4, unit: 'F' }]);
});

test('one question follows the other: what the comma is, which number, which unit', async () => {
  const { say, probe, temps, is } = await linked();
  await say('21,154\n');
  probe.answer('apart');
  await say('21,154\n');
  probe.answer('1');
  await say('21,154\n');
  probe.answer('F');
  await say('21,155\n');

  expect(is()).toBe('reading');
  expect(temps()).toEqual([155]);
});

test('lines without a temperature are counted, as those of a wrong speed are', async () => {
  const { say, probe, temps } = await linked();
  await say('ready\nERR_7\n');
  await say(Uint8Array.from({ length: 250 }, () => 0xff));
  const silence = probe.silence();
  await say('\n154.2 F\n');

  expect(silence).toEqual({ count: 3, why: 'unread' });
  expect(temps()).toEqual([154.2]);
});

test('an overrun loses what it lost, and reading goes on', async () => {
  const { say, port, is, temps } = await linked();
  await say('154.2 F\n15');
  port.stumble();
  await settled();
  await say('4.4 F\n154.6 F\n');

  expect(is()).toBe('reading');
  // 4.4 is the end of a line that was torn, not a reading.
  expect(temps()).toEqual([154.2, 154.6]);
});

test('pulled out and plugged in again, the granted port is read on without asking anybody', async () => {
  const { serial, say, port, is, temps } = await linked();
  await say('154.2 F\n');
  port.pull();
  await settled();
  const without = is();
  const again = new FakePort();
  serial.plugIn(again);
  await settled();
  await say(`${CUT}153.9 F\n`, again);

  expect(without).toBe('lost');
  expect(is()).toBe('reading');
  expect(temps()).toEqual([154.2, 153.9]);
});

test('a port that another program holds is tried again', async () => {
  const serial = new FakeSerial();
  const port = new FakePort();
  port.isPlugged = false;
  const clock = handClock();
  const probe = serialProbe(serial, port, 9_600, clock.parts);
  await settled();
  const before = probe.state().is;
  port.isPlugged = true;
  await clock.pass(1_000);

  expect([before, probe.state().is]).toEqual(['lost', 'reading']);
});

test('let go of, the port is closed and not opened again', async () => {
  const { serial, probe, port, clock, is } = await linked();
  await probe.close();
  await settled();
  serial.plugIn(port);
  await settled();

  expect(is()).toBe('ended');
  expect(port.readable).toBeNull();
  expect(port.speeds).toHaveLength(1);
  expect(clock.nextMs()).toBeNull();
});
