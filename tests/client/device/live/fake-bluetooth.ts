import type {
  BluetoothCharacteristic,
  BluetoothDevice,
  BluetoothServer,
} from '#client/device/live/bluetooth-browser.ts';

type Properties = BluetoothCharacteristic['properties'];

/** One value of a device, with the events that the Web Bluetooth draft fires: also for an answer to a question. */
export class FakeCharacteristic extends EventTarget implements BluetoothCharacteristic {
  readonly properties: Properties;
  value: DataView | undefined;
  /** What a question is answered with. */
  holds: DataView;
  asked = 0;
  isCalling = false;

  constructor(properties: Partial<Properties>, holds: DataView) {
    super();
    this.properties = { read: false, notify: false, indicate: false, ...properties };
    this.holds = holds;
  }

  async readValue(): Promise<DataView> {
    if (!this.properties.read) throw new DOMException('not permitted', 'NotSupportedError');
    this.asked++;
    await Promise.resolve();
    this.say(this.holds);
    return this.holds;
  }

  startNotifications(): Promise<this> {
    if (!this.properties.notify && !this.properties.indicate) {
      return Promise.reject(new DOMException('not supported', 'NotSupportedError'));
    }
    this.isCalling = true;
    return Promise.resolve(this);
  }

  /** The device calls by itself. */
  call(value: DataView): void {
    if (this.isCalling) this.say(value);
  }

  private say(value: DataView): void {
    this.value = value;
    this.dispatchEvent(new Event('characteristicvaluechanged'));
  }
}

/** A device on the radio: what it has by service, whether it is near, and a link that can be torn. */
export class FakeBluetoothDevice extends EventTarget implements BluetoothDevice {
  readonly id = 'probe-1';
  readonly name = 'Exhaust 7';
  readonly gatt: BluetoothServer;
  isNear = true;
  links = 0;
  private isLinked = false;
  private readonly byService: Map<number, FakeCharacteristic[]>;

  constructor(services: Record<number, FakeCharacteristic[]>) {
    super();
    this.byService = new Map(Object.entries(services).map(([id, has]) => [Number(id), has]));
    const isLinked = () => this.isLinked;
    const server: BluetoothServer = {
      get connected() {
        return isLinked();
      },
      connect: async () => {
        this.links++;
        if (!this.isNear) throw new DOMException('out of reach', 'NetworkError');
        this.isLinked = true;
        return server;
      },
      disconnect: () => this.tear(),
      getPrimaryService: async (service) => {
        if (!this.isLinked) throw new DOMException('not connected', 'NetworkError');
        const has = this.byService.get(service);
        if (!has) throw new DOMException('no such service', 'NotFoundError');
        return { getCharacteristics: () => Promise.resolve(has) };
      },
    };
    this.gatt = server;
  }

  /** Out of reach, or switched off. */
  tear(): void {
    if (!this.isLinked) return;
    this.isLinked = false;
    for (const each of [...this.byService.values()].flat()) each.isCalling = false;
    this.dispatchEvent(new Event('gattserverdisconnected'));
  }
}
