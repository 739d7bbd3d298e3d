/** The part of Web Serial that is used here (WICG, draft), which TypeScript's DOM lacks. */
export type SerialPort = {
  readonly readable: ReadableStream<Uint8Array> | null;
  open: (how: { baudRate: number }) => Promise<void>;
  close: () => Promise<void>;
  getInfo: () => { usbVendorId?: number | undefined; usbProductId?: number | undefined };
};

export type Serial = Pick<EventTarget, 'addEventListener' | 'removeEventListener'> & {
  requestPort: () => Promise<SerialPort>;
  /** Those granted before that are plugged in now. */
  getPorts: () => Promise<SerialPort[]>;
};

/** The browser's, where it has one and the page may use it. */
export function browserSerial(): Serial | null {
  const found = 'serial' in navigator ? navigator.serial : undefined;
  return isSerial(found) ? found : null;
}

function isSerial(found: unknown): found is Serial {
  return typeof found === 'object' && found !== null && 'requestPort' in found;
}

/** The port that an event of Serial is about. */
export function isSerialPort(target: EventTarget | null): target is EventTarget & SerialPort {
  return target !== null && 'open' in target && 'getInfo' in target;
}
