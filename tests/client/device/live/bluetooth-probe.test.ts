import { expect, test } from 'vitest';
import { bluetoothProbe, chooseBluetooth } from '#client/device/live/bluetooth-probe.ts';
import type { LiveProbe, LiveReading } from '#client/device/live/live-probe.ts';
import { bytes } from '#tests/shared/probes/live/bytes.ts';
import { FakeBluetoothDevice, FakeCharacteristic } from './fake-bluetooth.ts';
import { handClock, settled } from './hand-clock.ts';

const ESS = 0x181a;
const HTS = 0x1809;
// 68.25 °C and 68.26 °C of Temperature, 154.9 °F of Temperature Measurement: see tests/shared/probes/live.
const C_68_25 = bytes('A9 1A');
const C_68_26 = bytes('AA 1A');
const F_154_9 = bytes('01 0D 06 00 FF');

const calling = () => new FakeCharacteristic({ read: true, notify: true }, C_68_25);

async function linked(device: FakeBluetoothDevice) {
  const clock = handClock();
  const probe = bluetoothProbe(device, clock.parts);
  const readings: LiveReading[] = [];
  probe.onReading((reading) => readings.push(reading));
  await settled();
  return { probe, clock, readings, is: () => probe.state().is };
}

test('a probe is looked for by the services that hold a temperature', async () => {
  const wanted: unknown[] = [];
  const device = new FakeBluetoothDevice({ [ESS]: [calling()] });

  const chosen = await chooseBluetooth({
    requestDevice: (options) => {
      wanted.push(options);
      return Promise.resolve(device);
    },
  });

  expect(chosen).toBe(device);
  expect(wanted).toEqual([{ filters: [{ services: [0x181a] }, { services: [0x1809] }] }]);
});

test('what the probe says by itself is a reading at the moment that it arrives', async () => {
  const temperature = calling();
  const { probe, clock, readings, is } = await linked(
    new FakeBluetoothDevice({ [ESS]: [temperature] }),
  );
  await clock.pass(400);
  temperature.call(C_68_25);
  await clock.pass(1000);
  temperature.call(C_68_26);

  expect(is()).toBe('reading');
  expect(probe.name).toBe('Exhaust 7');
  expect(readings).toEqual([
    { temp: 68.25, unit: 'C', monoMs: 1400 },
    { temp: 68.26, unit: 'C', monoMs: 2400 },
  ]);
});

test('a health thermometer is taken in the unit that it speaks', async () => {
  const measurement = new FakeCharacteristic({ indicate: true }, F_154_9);
  const { readings } = await linked(new FakeBluetoothDevice({ [HTS]: [measurement] }));

  measurement.call(F_154_9);

  expect(readings).toEqual([{ temp: 154.9, unit: 'F', monoMs: 1000 }]);
});

test('a probe that does not call is asked each second, and each answer counts once', async () => {
  const temperature = new FakeCharacteristic({ read: true }, C_68_25);
  const { clock, readings } = await linked(new FakeBluetoothDevice({ [ESS]: [temperature] }));
  await clock.pass(3_500);

  expect(readings.map(({ monoMs }) => monoMs)).toEqual([1000, 2000, 3000, 4000]);
});

test('a probe that calls only when the temperature changes is asked when it falls silent', async () => {
  const temperature = calling();
  const { clock, readings } = await linked(new FakeBluetoothDevice({ [ESS]: [temperature] }));
  temperature.call(C_68_25);
  await clock.pass(1_000);
  temperature.call(C_68_25);
  await clock.pass(2_900);
  const before = readings.length;
  await clock.pass(200);

  expect(before).toBe(2);
  expect(readings).toHaveLength(3);
});

test('a probe of one call in ten seconds is not asked for what it said before', async () => {
  const temperature = calling();
  const { clock } = await linked(new FakeBluetoothDevice({ [ESS]: [temperature] }));
  for (let i = 0; i < 5; i++) {
    temperature.call(C_68_25);
    await clock.pass(9_900);
  }

  expect(temperature.asked).toBe(0);
});

test('a torn link is tried again after 1, 2, 4, 8 and then each 15 s, and goes on reading once it stands', async () => {
  const temperature = calling();
  const device = new FakeBluetoothDevice({ [ESS]: [temperature] });
  const { clock, readings, is } = await linked(device);
  device.isNear = false;
  device.tear();
  const waits: (number | null)[] = [];
  for (let i = 0; i < 6; i++) {
    waits.push(clock.nextMs());
    await clock.pass(clock.nextMs() ?? 0);
    // The patience with a link that came to nothing is taken back at once.
  }

  expect(waits).toEqual([1000, 2000, 4000, 8000, 15000, 15000]);
  expect(is()).toBe('lost');

  device.isNear = true;
  await clock.pass(15_000);
  temperature.call(C_68_26);

  expect(is()).toBe('reading');
  expect(readings.map(({ temp }) => temp)).toEqual([68.26]);
});

test('a press tries a lost link at once', async () => {
  const device = new FakeBluetoothDevice({ [ESS]: [calling()] });
  const { probe, is } = await linked(device);
  device.tear();
  probe.tryNow();
  await settled();

  expect(is()).toBe('reading');
});

test('a link that neither comes about nor fails is given up after 20 s', async () => {
  const device = new FakeBluetoothDevice({ [ESS]: [calling()] });
  const connect = device.gatt.connect;
  device.gatt.connect = () => new Promise(() => {});
  const { clock, is } = await linked(device);
  await clock.pass(19_900);
  const before = is();
  await clock.pass(200);
  const after = is();
  device.gatt.connect = connect;
  await clock.pass(1_000);

  expect([before, after, is()]).toEqual(['connecting', 'lost', 'reading']);
});

test('of two temperatures the person says which one counts, also after the link was torn', async () => {
  const [box, exhaust] = [calling(), calling()];
  exhaust.holds = C_68_26;
  const device = new FakeBluetoothDevice({ [ESS]: [box, exhaust] });
  const { probe, readings, is } = await linked(device);
  const asked = probe.state();
  probe.answer('1');
  await settled();
  box.call(C_68_25);
  exhaust.call(C_68_26);
  device.tear();
  probe.tryNow();
  await settled();
  exhaust.call(C_68_25);

  expect(asked).toMatchObject({
    is: 'asks',
    question: { options: [{ words: 'No. 1, now 68.25 °C' }, { words: 'No. 2, now 68.26 °C' }] },
  });
  expect(is()).toBe('reading');
  expect(readings.map(({ temp }) => temp)).toEqual([68.26, 68.25]);
});

test('garbage and a value that the probe does not know are counted, and are no readings', async () => {
  const temperature = calling();
  const { probe, readings } = await linked(new FakeBluetoothDevice({ [ESS]: [temperature] }));
  for (const octets of ['00 80', '', '01 02 03']) temperature.call(bytes(octets));
  const silence = probe.silence();
  temperature.call(C_68_25);

  expect(silence).toEqual({ count: 3, why: 'malformed' });
  expect(probe.silence()).toEqual({ count: 0, why: null });
  expect(readings).toHaveLength(1);
});

test('a probe without a temperature ends with the reason', async () => {
  const { probe } = await linked(new FakeBluetoothDevice({ 0x180f: [calling()] }));

  expect(probe.state()).toEqual({
    is: 'ended',
    why: 'This probe has no temperature that the page can read.',
  });
});

test('let go of, the probe is parted from and nothing is tried again', async () => {
  const temperature = calling();
  const device = new FakeBluetoothDevice({ [ESS]: [temperature] });
  const { probe, clock, readings } = await linked(device);
  await closeAndWait(probe);
  temperature.call(C_68_25);

  expect(device.gatt.connected).toBe(false);
  expect(device.links).toBe(1);
  expect(clock.nextMs()).toBeNull();
  expect(readings).toEqual([]);
  expect(probe.state()).toEqual({ is: 'ended', why: null });
});

async function closeAndWait(probe: LiveProbe): Promise<void> {
  await probe.close();
  await settled();
}
