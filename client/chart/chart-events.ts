import type { Call, Point } from '#shared/analysis/analysis.ts';
import { wordCall } from '#shared/wording/word-call.ts';
import type { Strip } from './strip.ts';

/** Something that happened at a moment: what N and P step through, and the rows of the event table. */
export type ChartEvent = {
  timeS: number;
  /** null for what has a time alone, such as a click. */
  tempC: number | null;
  words: string;
  call: Call | null;
  kind: Point['kind'] | 'mark' | 'note' | 'span';
};

export function eventsOf(strip: Strip): ChartEvent[] {
  const events = [
    ...pointEvents(strip.points, 'cut-out'),
    ...pointEvents(strip.points, 'reset'),
    ...strip.marks.map((mark) => ({
      timeS: mark.timeS,
      tempC: null,
      words: mark.word,
      call: null,
      kind: 'mark' as const,
    })),
    ...strip.notes.map((note) => ({
      timeS: note.timeS,
      tempC: note.tempC,
      words: `note ${note.letter}: ${note.text}`,
      call: null,
      kind: 'note' as const,
    })),
    ...strip.hotSpans.map((span) => ({
      timeS: span.fromS,
      tempC: null,
      words: span.words.join(', '),
      call: null,
      kind: 'span' as const,
    })),
  ];
  return events.sort((a, b) => a.timeS - b.timeS);
}

function pointEvents(points: Point[], kind: Point['kind']): ChartEvent[] {
  return points
    .filter((point) => point.kind === kind)
    .sort((a, b) => a.timeS - b.timeS)
    .map((point, i) => ({
      timeS: point.timeS,
      tempC: point.tempC,
      words: `${kind} ${i + 1}${point.call ? `, ${wordCall(point.call).word}` : ', not judged'}`,
      call: point.call,
      kind,
    }));
}

/** What happened at a reading, within half a second or a pixel. */
export function eventAt(events: ChartEvent[], timeS: number, withinS: number): ChartEvent | null {
  const reachS = Math.max(0.5, withinS);
  let nearest: ChartEvent | null = null;
  for (const event of events) {
    const apartS = Math.abs(event.timeS - timeS);
    if (apartS > reachS) continue;
    if (nearest === null || apartS < Math.abs(nearest.timeS - timeS)) nearest = event;
  }
  return nearest;
}
