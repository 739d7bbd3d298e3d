import type { LiveValue } from '#shared/probes/live/live-value.ts';
import { readHealthThermometer } from '#shared/probes/live/read-health-thermometer.ts';
import { readTemperature } from '#shared/probes/live/read-temperature.ts';
import type { BluetoothCharacteristic, BluetoothServer } from './bluetooth-browser.ts';

/** Assigned numbers of the Bluetooth SIG (Assigned Numbers, sections 3.4.2 and 3.8.1). */
type TemperatureService = {
  service: number;
  characteristic: number;
  read: (value: DataView) => LiveValue;
};

/** In the order in which a probe that has both is asked: the first says hundredths and may be read at any time. */
export const TEMPERATURE_SERVICES: readonly TemperatureService[] = [
  { service: 0x181a, characteristic: 0x2a6e, read: readTemperature },
  { service: 0x1809, characteristic: 0x2a1c, read: readHealthThermometer },
];

export type FoundTemperatures = {
  characteristics: BluetoothCharacteristic[];
  read: TemperatureService['read'];
};

/** @returns null where the probe has no temperature that the page knows @throws the link's own errors */
export async function findTemperatures(server: BluetoothServer): Promise<FoundTemperatures | null> {
  for (const { service, characteristic, read } of TEMPERATURE_SERVICES) {
    const characteristics = await orNone(async () => {
      const found = await server.getPrimaryService(service);
      return found.getCharacteristics(characteristic);
    });
    if (characteristics.length > 0) return { characteristics, read };
  }
  return null;
}

/** A service that a device does not have is no failure of the link (Web Bluetooth: NotFoundError). */
async function orNone(
  find: () => Promise<BluetoothCharacteristic[]>,
): Promise<BluetoothCharacteristic[]> {
  try {
    return await find();
  } catch (error) {
    if (error instanceof Error && error.name === 'NotFoundError') return [];
    throw error;
  }
}
