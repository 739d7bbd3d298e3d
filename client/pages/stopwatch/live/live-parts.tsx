/** Everything of the live probe that a page shows, as one chunk: see lazy-live.tsx. */
export { liveDesk } from './live-desk.ts';
export { ProbeLine } from './probe-line.tsx';
export { ProbePart } from './probe-part.tsx';
