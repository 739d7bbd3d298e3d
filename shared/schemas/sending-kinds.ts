/** What a device may send later. A kind is never renamed: phones out in the field may still hold some. */
export const SENDING_KINDS = [
  'run-event',
  'visit-edit',
  'safety-ticks',
  'run-note',
  'run-note-edit',
  'run-note-removal',
] as const;
export type SendingKind = (typeof SENDING_KINDS)[number];

/** At most so many things in one request. */
export const MOST_THINGS = 500;

/** Of one thing, as JSON in UTF-8; a request holds 100 kB. */
export const MOST_THING_BYTES = 48_000;
