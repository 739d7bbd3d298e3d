import type { Page } from '@playwright/test';

declare global {
  interface Window {
    fakeProbe: { say(steps: number): void; setNear(isNear: boolean): void; links(): number };
  }
}

/** A temperature as Temperature (0x2A6E) holds it: whole steps of 0.01 °C; null: "value is not known". */
export type Said = number | null;

/**
 * A probe that speaks the Environmental Sensing Service, behind the browser's own interface: it is near or not, says
 * what it is told to, and goes when it is out of reach.
 */
export async function layFakeProbe(page: Page) {
  await page.addInitScript(installFakeProbe);
  return {
    say: (tempC: Said) =>
      page.evaluate(
        (steps) => window.fakeProbe.say(steps),
        tempC === null ? -0x8000 : Math.round(tempC * 100),
      ),
    setNear: (isNear: boolean) => page.evaluate((near) => window.fakeProbe.setNear(near), isNear),
    links: () => page.evaluate(() => window.fakeProbe.links()),
  };
}

/** Runs in the page, before its own scripts. */
function installFakeProbe(): void {
  let isNear = true;
  let isLinked = false;
  let links = 0;
  let calls = false;
  const temperature = Object.assign(new EventTarget(), {
    properties: { read: false, notify: true, indicate: false },
    value: undefined as DataView | undefined,
    readValue: () => Promise.reject(new DOMException('not permitted', 'NotSupportedError')),
    startNotifications: () => Promise.resolve((calls = true)),
  });
  const device = Object.assign(new EventTarget(), { id: 'probe-7', name: 'Exhaust 7' });
  const server = {
    get connected() {
      return isLinked;
    },
    connect() {
      links++;
      if (!isNear) return Promise.reject(new DOMException('out of reach', 'NetworkError'));
      isLinked = true;
      return Promise.resolve(server);
    },
    disconnect: () => tear(),
    getPrimaryService: (service: number) =>
      service === 0x181a
        ? Promise.resolve({ getCharacteristics: () => Promise.resolve([temperature]) })
        : Promise.reject(new DOMException('no such service', 'NotFoundError')),
  };
  function tear(): void {
    if (!isLinked) return;
    isLinked = false;
    calls = false;
    device.dispatchEvent(new Event('gattserverdisconnected'));
  }
  const bluetooth = {
    requestDevice: () => Promise.resolve(Object.assign(device, { gatt: server })),
  };
  Object.defineProperty(navigator, 'bluetooth', { value: bluetooth, configurable: true });
  window.fakeProbe = {
    say(steps) {
      if (!isLinked || !calls) return;
      const value = new DataView(new ArrayBuffer(2));
      value.setInt16(0, steps, true);
      temperature.value = value;
      temperature.dispatchEvent(new Event('characteristicvaluechanged'));
    },
    setNear(near) {
      isNear = near;
      if (!near) tear();
    },
    links: () => links,
  };
}
