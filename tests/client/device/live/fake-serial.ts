import type { Serial, SerialPort } from '#client/device/live/serial-browser.ts';

/** A port as Web Serial has it: a stream while it is open, an error and no stream once it was pulled out. */
export class FakePort extends EventTarget implements SerialPort {
  readable: ReadableStream<Uint8Array> | null = null;
  speeds: number[] = [];
  isPlugged = true;
  private line: ReadableStreamDefaultController<Uint8Array> | null = null;

  getInfo() {
    return { usbVendorId: 0x1234, usbProductId: 7 };
  }

  open({ baudRate }: { baudRate: number }): Promise<void> {
    if (!this.isPlugged) return Promise.reject(new DOMException('no device', 'NetworkError'));
    if (this.readable) return Promise.reject(new DOMException('open', 'InvalidStateError'));
    this.speeds.push(baudRate);
    this.stream();
    return Promise.resolve();
  }

  close(): Promise<void> {
    this.readable = null;
    return Promise.resolve();
  }

  private stream(): void {
    this.readable = new ReadableStream<Uint8Array>({ start: (line) => void (this.line = line) });
  }

  say(text: string | Uint8Array): void {
    this.line?.enqueue(typeof text === 'string' ? new TextEncoder().encode(text) : text);
  }

  /** An overrun: this stream ends in an error, the port offers another. */
  stumble(): void {
    const { line } = this;
    this.stream();
    line?.error(new DOMException('overrun', 'BufferOverrunError'));
  }

  pull(): void {
    this.isPlugged = false;
    const { line } = this;
    this.readable = null;
    line?.error(new DOMException('The device has been lost.', 'NetworkError'));
  }
}

export class FakeSerial extends EventTarget implements Serial {
  ports: FakePort[] = [];

  requestPort(): Promise<SerialPort> {
    const [port] = this.ports;
    return port
      ? Promise.resolve(port)
      : Promise.reject(new DOMException('none chosen', 'NotFoundError'));
  }

  getPorts(): Promise<SerialPort[]> {
    return Promise.resolve(this.ports);
  }

  /** As an event that bubbles up from the port: its target is the port. */
  plugIn(port: FakePort): void {
    port.isPlugged = true;
    const event = new Event('connect');
    Object.defineProperty(event, 'target', { value: port });
    this.dispatchEvent(event);
  }
}
