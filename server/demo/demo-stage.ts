import type { JobsWiring } from '#server/wiring/wire-jobs.ts';
import type { RunsWiring } from '#server/wiring/wire-runs.ts';
import type { DemoClock } from './demo-clock.ts';
import type { SampleLog } from './sample-log.ts';
import type { DemoThings } from './seed-homes.ts';
import type { DemoStaff } from './seed-people.ts';

/** All that a story is told with. */
export type DemoStage = {
  jobs: JobsWiring;
  runs: RunsWiring;
  staff: DemoStaff;
  things: DemoThings;
  logs: Map<string, SampleLog>;
  clock: DemoClock;
  /** When the demo is laid: what is planned after it has not happened yet. */
  startMs: number;
};
