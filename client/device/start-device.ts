import { setShelf } from '../api/http.ts';
import { asOf } from './as-of.ts';
import { line } from './line.ts';
import { createShelf } from './shelf.ts';
import { keepSending, thisDevice } from './this-device.ts';
import { watchVersions } from './versions.ts';

/**
 * From here on answers are kept and given back, and things are sent. Once a page, before the first question.
 *
 * @param onLate an answer came after what lies here was shown in its stead
 */
export function startDevice(onLate: (url: string) => void = () => {}): void {
  setShelf(createShelf(thisDevice, asOf, onLate, line));
  keepSending.start();
  watchVersions();
  // Asked once; the browser remembers. Without it a full phone may let go of everything.
  void navigator.storage?.persist?.();
}
