/** What one way of judging did on a set of runs. */
export type Tally = {
  runs: number;
  rightHeadline: number;
  rightSet: number;
  falselyInBand: number;
  falseAlarms: number;
  criedRunaways: number;
  missedRunaways: number;
  hits: number;
  missed: number;
  invented: number;
  coveredTemps: number;
  coveredSwitches: number;
  tempErrorsF: number[];
  timeErrorsS: number[];
  uF: number[];
  switchErrorsS: number[];
  switchUS: number[];
  /** Of the guard: seconds from its alarm to the high limit, over runs that reach it. */
  leadsS: number[];
  soundRuns: number;
  soundCut: number;
  soundWatched: number;
  turningRuns: number;
  turningCut: number;
};

export function emptyTally(): Tally {
  return {
    runs: 0,
    rightHeadline: 0,
    rightSet: 0,
    falselyInBand: 0,
    falseAlarms: 0,
    criedRunaways: 0,
    missedRunaways: 0,
    hits: 0,
    missed: 0,
    invented: 0,
    coveredTemps: 0,
    coveredSwitches: 0,
    tempErrorsF: [],
    timeErrorsS: [],
    uF: [],
    switchErrorsS: [],
    switchUS: [],
    leadsS: [],
    soundRuns: 0,
    soundCut: 0,
    soundWatched: 0,
    turningRuns: 0,
    turningCut: 0,
  };
}

/** Adds one tally to another. */
export function addTally(sum: Tally, more: Tally): void {
  for (const key of Object.keys(more) as (keyof Tally)[]) {
    const into = sum[key];
    const from = more[key];
    if (Array.isArray(into) && Array.isArray(from)) for (const value of from) into.push(value);
    else if (typeof into === 'number' && typeof from === 'number') put(sum, key, into + from);
  }
}

function put(sum: Tally, key: keyof Tally, value: number): void {
  Object.assign(sum, { [key]: value });
}
