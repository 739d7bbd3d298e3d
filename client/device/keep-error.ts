const WORDS = {
  full: 'This phone has no room left, so that was not kept. Make room on it, then try again.',
  closed: 'This page lost its store on the phone. Reload the page, then try again.',
  nobody: 'Nobody is signed in on this phone, so that was not kept.',
  'too-large': 'That is too much for one sending, so it was not kept.',
  failed: 'This phone could not keep that. Try again; write the figure down meanwhile.',
} as const;

export type KeepProblem = keyof typeof WORDS;

/** Nothing was kept, and why, in words for the page. */
export class KeepError extends Error {
  override name = 'KeepError';
  readonly problem: KeepProblem;

  constructor(problem: KeepProblem, options?: ErrorOptions) {
    super(WORDS[problem], options);
    this.problem = problem;
  }
}

const PROBLEMS: Record<string, KeepProblem> = {
  QuotaExceededError: 'full',
  InvalidStateError: 'closed',
  VersionError: 'closed',
};

/** What the store on the device throws, as something that a page can say. */
export function toKeepError(error: unknown): KeepError {
  if (error instanceof KeepError) return error;
  const name = error instanceof Error || error instanceof DOMException ? error.name : '';
  return new KeepError(PROBLEMS[name] ?? 'failed', { cause: error });
}
