import {
  NOTHING_SAID,
  readSerialLine,
  type SerialQuestion,
} from '#shared/probes/live/read-serial-line.ts';
import { splitLines } from '#shared/probes/live/split-lines.ts';
import { createLiveLine } from './live-line.ts';
import { retryMs, type LiveParts, type LiveProbe } from './live-probe.ts';
import { isSerialPort, type Serial, type SerialPort } from './serial-browser.ts';
import { withAnswer, wordQuestion } from './serial-question.ts';

/** Usual speeds of a serial thermometer or of a board that reads one, bit/s. */
export const BAUD_RATES = [115_200, 57_600, 38_400, 19_200, 9_600, 4_800, 2_400] as const;

/** So many faults with nothing between them: the port is let rest before it is tried again. */
const MOST_FAULTS = 10;

/** A probe on a cable, from its first link on. */
export function serialProbe(
  serial: Serial,
  granted: SerialPort,
  baudRate: number,
  parts: LiveParts,
): LiveProbe {
  const line = createLiveLine(parts.nowMs);
  let port = granted;
  let answers = NOTHING_SAID;
  let question: SerialQuestion | null = null;
  let failures = 0;
  let isClosed = false;
  let isLinking = false;
  let reader: ReadableStreamDefaultReader<Uint8Array> | null = null;
  let cancelRetry = () => {};

  async function link(): Promise<void> {
    if (isLinking || isClosed) return;
    isLinking = true;
    cancelRetry();
    const linked = port;
    try {
      await linked.open({ baudRate });
      if (!isClosed) {
        question = null;
        line.show({ is: 'reading' });
        await readAll(linked);
      }
    } catch {
      // Not plugged in, or held by another program: tried again below.
    }
    await linked.close().catch(() => {});
    isLinking = false;
    if (!isClosed) loseLink();
  }

  /** Until the port is gone; an overrun or a wrong bit only ends one stream, and the port offers the next. */
  async function readAll(from: SerialPort): Promise<void> {
    let faults = 0;
    while (from.readable && !isClosed && faults < MOST_FAULTS) {
      const decoder = new TextDecoder();
      let rest = '';
      // A stream begins anywhere in a line: what "4.2 F" is the end of cannot be known.
      let isFirst = true;
      reader = from.readable.getReader();
      try {
        for (;;) {
          const { value, done } = await reader.read();
          if (done) break;
          faults = 0;
          const split = splitLines(rest, decoder.decode(value, { stream: true }));
          rest = split.rest;
          for (let i = 0; i < split.noise; i++) line.take({ none: 'unread' });
          for (const each of isFirst ? split.lines.slice(1) : split.lines) takeLine(each);
          isFirst &&= split.lines.length === 0;
        }
      } catch {
        faults++;
        line.take({ none: 'unread' });
      } finally {
        reader.releaseLock();
        reader = null;
      }
    }
  }

  function takeLine(text: string): void {
    failures = 0;
    const read = readSerialLine(text, answers);
    if (read.is === 'value') {
      if (question) settle();
      return line.take(read.value);
    }
    if (read.is === 'unread') return line.take({ none: 'unread' });
    if (question) return;
    question = read.question;
    line.show({ is: 'asks', question: wordQuestion(question) });
  }

  function settle(): void {
    question = null;
    line.show({ is: 'reading' });
  }

  function loseLink(): void {
    failures++;
    cancelRetry = parts.after(retryMs(failures), () => void link());
    line.show({ is: 'lost' });
  }

  /** Plugged in again: the browser may hand out another object for the same plug. */
  function handleConnect({ target }: Event): void {
    if (!isSerialPort(target) || !isAlike(target, port)) return;
    port = target;
    void link();
  }

  serial.addEventListener('connect', handleConnect);
  void link();
  return {
    ...line.shared,
    name: `Cable, ${baudRate.toLocaleString('en-US')} bit/s`,
    by: 'cable',
    answer(key) {
      if (!question) return;
      answers = withAnswer(answers, question, key);
      settle();
    },
    tryNow: () => void link(),
    async close() {
      if (isClosed) return;
      isClosed = true;
      cancelRetry();
      serial.removeEventListener('connect', handleConnect);
      line.show({ is: 'ended', why: null });
      await reader?.cancel().catch(() => {});
    },
  };
}

function isAlike(one: SerialPort, other: SerialPort): boolean {
  const [a, b] = [one.getInfo(), other.getInfo()];
  return a.usbVendorId === b.usbVendorId && a.usbProductId === b.usbProductId;
}
