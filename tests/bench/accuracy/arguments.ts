/** What `npm run bench -- accuracy …` is told. */
export type AccuracyArguments = {
  seeds: number;
  from: number;
  /** List each run with a wrong first code or wrong codes. */
  wrong: boolean;
  /** Print a line a plan too. */
  plans: boolean;
  /** Every plan by every third method, in turn from seed to seed: three seeds thin cost as much as one. */
  thin: boolean;
  /** Only methods and plans whose name holds this. */
  method: string;
  plan: string;
  /** Write one run out instead: its readings, its truth and what the engine says. */
  inspect: boolean;
};

/** Seeds 1–99 are for tuning; those reported begin here. */
const REPORTED_FROM = 101;
const USUAL_SEEDS = 3;

/** `[seeds] [first seed] [wrong] [plans] [thin] [inspect] [--method X] [--plan Y]`. */
export function readArguments(args: string[]): AccuracyArguments {
  const numbers = args.filter((arg) => /^\d+$/.test(arg)).map(Number);
  const after = (flag: string) => {
    const at = args.indexOf(flag);
    return at < 0 ? '' : (args[at + 1] ?? '');
  };
  const inspect = args.includes('inspect');
  return {
    seeds: inspect ? 1 : (numbers[0] ?? USUAL_SEEDS),
    from: (inspect ? numbers[0] : numbers[1]) ?? REPORTED_FROM,
    wrong: args.includes('wrong'),
    plans: args.includes('plans'),
    thin: args.includes('thin'),
    method: after('--method'),
    plan: after('--plan'),
    inspect,
  };
}
