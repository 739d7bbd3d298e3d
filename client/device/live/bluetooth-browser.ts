/** The part of Web Bluetooth that is used here (Web Bluetooth Community Group, draft), which TypeScript's DOM lacks. */
export type BluetoothCharacteristic = Pick<
  EventTarget,
  'addEventListener' | 'removeEventListener'
> & {
  readonly properties: {
    readonly read: boolean;
    readonly notify: boolean;
    readonly indicate: boolean;
  };
  readonly value?: DataView | undefined;
  readValue: () => Promise<DataView>;
  startNotifications: () => Promise<unknown>;
};

export type BluetoothService = {
  getCharacteristics: (characteristic: number) => Promise<BluetoothCharacteristic[]>;
};

export type BluetoothServer = {
  readonly connected: boolean;
  connect: () => Promise<BluetoothServer>;
  disconnect: () => void;
  getPrimaryService: (service: number) => Promise<BluetoothService>;
};

export type BluetoothDevice = Pick<EventTarget, 'addEventListener' | 'removeEventListener'> & {
  readonly id: string;
  readonly name?: string | undefined;
  readonly gatt?: BluetoothServer | undefined;
};

export type Bluetooth = {
  requestDevice: (wanted: { filters: { services: number[] }[] }) => Promise<BluetoothDevice>;
  /** Devices that were granted before; not in every browser. */
  getDevices?: () => Promise<BluetoothDevice[]>;
};

/** The browser's, where it has one and the page may use it. */
export function browserBluetooth(): Bluetooth | null {
  const found = 'bluetooth' in navigator ? navigator.bluetooth : undefined;
  return isBluetooth(found) ? found : null;
}

function isBluetooth(found: unknown): found is Bluetooth {
  return typeof found === 'object' && found !== null && 'requestDevice' in found;
}
