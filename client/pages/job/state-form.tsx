import { useState, type SubmitEvent } from 'react';
import { JOB_STATES, jobStateSchema, type JobPage, type JobState } from '#shared/schemas/jobs.ts';
import { useChangeJob } from '../../api/jobs.ts';
import { Cells, SelectField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Slip } from '../../components/slip.tsx';
import { JOB_STATE_WORDS } from '../../format/job-words.ts';

const ENDS: JobState[] = ['fixed', 'closed'];

/** A job that ends without a proven run is worth a second thought. */
function isProven(job: JobPage) {
  return job.visits.some(({ runs }) => runs.some(({ outcome }) => outcome === 'proven'));
}

export function StateForm({ job }: { job: JobPage }) {
  const change = useChangeJob(job.id);
  const [asked, setAsked] = useState<JobState | null>(null);

  const put = (state: JobState) => change.mutate({ state }, { onSettled: () => setAsked(null) });

  function handleSubmit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    const state = jobStateSchema.parse(new FormData(event.currentTarget).get('state'));
    if (ENDS.includes(state) && !ENDS.includes(job.state) && !isProven(job)) setAsked(state);
    else put(state);
  }

  return (
    <section>
      <SectionHead state={JOB_STATE_WORDS[job.state].toLowerCase()}>Where it stands</SectionHead>
      <form onSubmit={handleSubmit} className="grid gap-3 pt-3">
        <Cells>
          <SelectField
            key={job.state}
            label="State"
            name="state"
            defaultValue={job.state}
            error={change.error?.message}
          >
            {JOB_STATES.map((state) => (
              <option key={state} value={state}>
                {JOB_STATE_WORDS[state]}
              </option>
            ))}
          </SelectField>
        </Cells>
        <Key type="submit" disabled={change.isPending}>
          {change.isPending ? 'Setting…' : 'Set the state'}
        </Key>
        <p role="status" className="lab">
          {change.isSuccess && `Now ${JOB_STATE_WORDS[job.state].toLowerCase()}.`}
        </p>
      </form>
      {asked && (
        <Slip
          question={`${asked === 'closed' ? 'Close' : 'Call'} job ${job.number} ${asked === 'closed' ? '' : 'fixed '}without a proof run?`}
          doer={asked === 'closed' ? 'Close, not proven' : 'Fixed, not proven'}
          isStop
          isBusy={change.isPending}
          onDo={() => put(asked)}
          onBack={() => setAsked(null)}
        >
          No run on this job is proven. It ends as “not proven”; a run made after the last part went
          in would settle it.
        </Slip>
      )}
    </section>
  );
}
