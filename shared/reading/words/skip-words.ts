/** Why one row was set aside. */
export const SKIP_WORDS = {
  notANumber: (value: string) => `not a number: ${shown(value)}`,
  noReading: (value: string) => (value === '' ? 'no reading' : `no reading: ${shown(value)}`),
  notATime: (value: string) => `not a time: ${shown(value)}`,
  noTime: () => 'no time',
  cellCount: (have: number, want: number) => `${have} cells where ${want} are expected`,
  unclosedQuote: () => 'a quote is never closed',
  headerAgain: () => 'the header again',
  emptyRow: () => 'empty row',
  cutOff: () => 'the last line is cut off',
  repeated: () => 'repeats an earlier row',
  sentinel: (value: string) => `stands for "no reading": ${shown(value)}`,
  noSuchSignal: (value: string) => `the sensor cannot give ${shown(value)}`,
  otherRun: () => 'belongs to another run',
};

function shown(value: string): string {
  return value.length > 40 ? `${value.slice(0, 40)}…` : value;
}
