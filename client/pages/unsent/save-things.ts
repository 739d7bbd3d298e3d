import type { DevicePerson, KeptThing } from '../../device/device-db.ts';
import type { Device } from '../../device/device.ts';

/** Puts things into a file of the browser's downloads, readable as they are. */
export async function saveThings(
  device: Device,
  person: DevicePerson,
  things: readonly KeptThing[],
): Promise<void> {
  const deviceId = await device.things.deviceId();
  const savedAt = new Date().toISOString();
  const file = { what: 'Fusekeeper: not sent yet', savedAt, deviceId, person, things };
  const url = URL.createObjectURL(
    new Blob([JSON.stringify(file, null, 2)], { type: 'application/json' }),
  );
  const link = document.createElement('a');
  link.href = url;
  link.download = `fusekeeper-not-sent-${savedAt.slice(0, 16).replace(/:/g, '')}.json`;
  link.click();
  // The browser has read it by then; freed at once it would find nothing.
  setTimeout(() => URL.revokeObjectURL(url), 60_000);
}
