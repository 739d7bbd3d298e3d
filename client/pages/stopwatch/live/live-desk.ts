import { browserBluetooth } from '../../../device/live/bluetooth-browser.ts';
import { pageClock } from '../../../device/live/live-probe.ts';
import { browserSerial } from '../../../device/live/serial-browser.ts';
import { createLiveDesk } from './create-live-desk.ts';

/** This page's. */
export const liveDesk = createLiveDesk(browserBluetooth(), browserSerial(), pageClock);
