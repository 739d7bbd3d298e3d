import type { LogColumn, QuestionSubject } from '#shared/reading/log-reading.ts';
import type { ReadPreview } from '#shared/schemas/uploads.ts';
import { unitWords } from '../../../format/rating-words.ts';

export const ROLE_WORDS: Record<LogColumn['role'], string> = {
  time: 'time',
  date: 'date',
  temperature: 'temperature',
  humidity: 'humidity',
  comment: 'words',
  other: 'not used',
};

const ENCODING_WORDS: Record<string, string> = {
  'utf-8': 'UTF-8',
  'utf-16le': 'UTF-16, low byte first',
  'utf-16be': 'UTF-16, high byte first',
  'windows-1252': 'Windows-1252',
};

const DELIMITER_WORDS: Record<string, string> = {
  ',': 'comma',
  ';': 'semicolon',
  '\t': 'tab',
  ' ': 'spaces',
  '|': 'upright bar',
};

type Understood = Pick<
  ReadPreview,
  'columns' | 'channel' | 'channelUnit' | 'clock' | 'startedAt' | 'decimal' | 'encoding'
>;

type Correction = {
  about: QuestionSubject;
  label: string;
  found: string;
  options: { answer: string; words: string }[];
};

/** What can be said otherwise about a file that was read. Only what bears on this file is offered. */
export function corrections(preview: Understood): Correction[] {
  const column = preview.columns.find(({ name }) => name === preview.channel);
  const from = column?.unitFrom ? `, from ${column.unitFrom}` : '';
  return [
    {
      about: 'unit',
      label: 'Unit',
      found: `${unitWords(preview.channelUnit)}${from}`,
      options: [
        { answer: 'F', words: '°F' },
        { answer: 'C', words: '°C' },
        { answer: 'K', words: 'K' },
      ],
    },
    { about: 'clock', label: 'Clock', found: preview.clock, options: clockOptions(preview.clock) },
    ...dateOrder(preview),
    {
      about: 'decimal',
      label: 'Decimal mark',
      found: preview.decimal === ',' ? 'comma' : 'point',
      options: [
        { answer: 'point', words: 'point' },
        { answer: 'comma', words: 'comma' },
      ],
    },
    {
      about: 'encoding',
      label: 'Encoding',
      found: ENCODING_WORDS[preview.encoding] ?? preview.encoding,
      options: Object.entries(ENCODING_WORDS).map(([answer, words]) => ({ answer, words })),
    },
  ];
}

/** A column of plain numbers, or of two fields, can be read in other ways; a full stamp cannot. */
function clockOptions(clock: string): Correction['options'] {
  const asIs = (answer: string) => ({ answer, words: answer });
  if (/^(seconds|minutes|hours|milliseconds)$/.test(clock)) {
    return ['seconds', 'minutes', 'hours', 'milliseconds'].map(asIs);
  }
  if (/(^|\s)(m:ss|h:mm)$/.test(clock)) {
    return [
      { answer: 'm:ss', words: 'minutes and seconds' },
      { answer: 'h:mm', words: 'hours and minutes' },
    ];
  }
  return [];
}

function dateOrder({ clock, startedAt }: Understood): Correction[] {
  if (startedAt === null || !/day first|month first|year first/i.test(clock)) return [];
  const found = /month first/i.test(clock)
    ? 'month first'
    : /year first/i.test(clock)
      ? 'year first'
      : 'day first';
  return [
    {
      about: 'date-order',
      label: 'Date',
      found,
      options: [
        { answer: 'day-first', words: 'day first' },
        { answer: 'month-first', words: 'month first' },
        { answer: 'year-first', words: 'year first' },
      ],
    },
  ];
}

/** "comma between columns". */
export function delimiterWords(delimiter: string): string {
  return DELIMITER_WORDS[delimiter] ?? `“${delimiter}”`;
}
