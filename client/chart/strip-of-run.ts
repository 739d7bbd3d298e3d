import type { Analysis, Finding } from '#shared/analysis/analysis.ts';
import type { MarkKind } from '#shared/analysis/series.ts';
import { formatSpan } from '#shared/wording/format.ts';
import type { Bands, HotSpan, PenMark, Span, Strip, StripNote } from './strip.ts';

/** What a mark's pen writes. */
export const MARK_WORDS: Record<MarkKind, string> = {
  click: 'click',
  'heat-off': 'heat off, by hand',
  'heat-on': 'heat on',
  'flame-on': 'flame on',
  stopped: 'machine stopped',
  door: 'door',
  'duct-off': 'duct off',
  note: 'note',
};

/** A mark as it crosses the wire. */
type RunMark = { timeS: number; kind: MarkKind; text?: string | undefined };

type StripSource = {
  analysis: Analysis;
  bands: Bands | null;
  marks: RunMark[];
  notes: Omit<StripNote, 'letter'>[];
};

/** An analysis as it stands on the paper. */
export function stripOfRun({ analysis, bands, marks, notes }: StripSource): Strip {
  const hotFindings = analysis.findings.filter(isHot);
  return {
    bands,
    points: [...analysis.cutOuts, ...analysis.resets],
    hotSpans: hotFindings.map(hotSpan),
    notes: letterNotes(notes),
    heat: heatOf(analysis),
    marks: [...marks.map((mark) => penMark(mark, hotFindings)), ...guardMark(analysis)],
    gaps: analysis.gaps,
  };
}

/** Letters in order of time: A, B … Z, AA. */
export function letterNotes<Note extends { timeS: number }>(
  notes: Note[],
): (Note & { letter: string })[] {
  return [...notes]
    .sort((a, b) => a.timeS - b.timeS)
    .map((note, i) => ({ ...note, letter: letterAt(i) }));
}

function letterAt(index: number): string {
  const last = String.fromCharCode(65 + (index % 26));
  return index < 26 ? last : letterAt(Math.floor(index / 26) - 1) + last;
}

function isHot({ code }: Finding): boolean {
  return code === 'runaway' || code === 'heat-stays-on';
}

function hotSpan({ code, fromS, toS }: Finding): HotSpan {
  const span = formatSpan(toS - fromS);
  const isRunaway = code === 'runaway';
  const words = isRunaway
    ? ['heat kept coming', `${span} with no cut-out`]
    : ['some heat stayed on', span];
  return { fromS, toS, words, traceIsHot: isRunaway };
}

/** Heat is on while the exhaust rises. */
function heatOf({ legs }: Analysis): Span[] {
  return legs.filter(({ kind }) => kind === 'heating').map(({ fromS, toS }) => ({ fromS, toS }));
}

function penMark(mark: RunMark, hotFindings: Finding[]): PenMark {
  const isStop = hotFindings.some(
    ({ fromS, toS }) => mark.kind === 'click' && mark.timeS >= fromS - 30 && mark.timeS < toS,
  );
  const word = mark.kind === 'note' && mark.text ? mark.text : MARK_WORDS[mark.kind];
  return { timeS: mark.timeS, word, isStop };
}

function guardMark({ guardAlarmS }: Analysis): PenMark[] {
  return guardAlarmS === null ? [] : [{ timeS: guardAlarmS, word: 'cut the heat', isStop: true }];
}
