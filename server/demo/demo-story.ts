import type { JobState } from '#shared/schemas/jobs.ts';

/** Days count from today (0), yesterday is −1. Times are those of the shop's own clock, "09:15". */
export type DemoTime = { day: number; at: string };

export type DemoNote = { timeS: number; text: string };

/** A run from a sample log; marks, room, load and duct are those that the log tells of. */
export type DemoRun = {
  log: string;
  at: string;
  label: string;
  probe: 'K1' | 'K2' | 'V4';
  notes?: DemoNote[];
  /** A link for the customer, open for so many days from today. */
  sharedForDays?: number;
};

export type DemoPart = { rating: string; lot: string };

export type DemoVisit = {
  day: number;
  from: string;
  to: string;
  who: 'tom' | 'ada';
  notes: string;
  runs?: DemoRun[];
  removed?: { rating: string; why: string };
  fitted?: DemoPart;
  /** When the parts were changed; at the end where nothing is said. */
  partsAt?: string;
};

export type DemoJob = {
  name: string;
  machine: string;
  taken: DemoTime;
  complaint: string;
  callsBack?: string;
  visits: DemoVisit[];
  state: JobState;
};
