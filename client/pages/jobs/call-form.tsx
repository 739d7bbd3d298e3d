import { useQuery } from '@tanstack/react-query';
import { useRef } from 'react';
import { useNavigate } from 'react-router-dom';
import type { z } from 'zod';
import type { Machine } from '#shared/schemas/homes.ts';
import { newJobSchema } from '#shared/schemas/jobs.ts';
import { jobsQuery, useBookVisit, useTakeJob } from '../../api/jobs.ts';
import { ErrorSummary } from '../../components/error-summary.tsx';
import { Cells, SelectField, TextAreaField } from '../../components/field.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import {
  blankVisit,
  typedVisitSchema,
  VISIT_FIELDS,
  VisitCells,
  visitOf,
} from '../../forms/visit-form.tsx';
import { FormFrame } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { quoted } from '../../format/job-words.ts';
import { useNowMs } from '../../format/use-now.ts';
import { dateWords } from '../../format/when.ts';
import { useSession } from '../frame/session-context.ts';

const callSchema = newJobSchema.and(typedVisitSchema);
type Call = z.output<typeof callSchema>;

/** The complaint, the job it calls back, and the first visit: sent as a job, then a visit on it. */
function useCallForm(machineId: string) {
  const { zone } = useSession().shop;
  const takeJob = useTakeJob();
  const bookVisit = useBookVisit();
  const navigate = useNavigate();
  // Where the visit is refused after the job was taken, another try books on that job and takes no second one.
  const takenJobId = useRef<string | null>(null);

  async function save(call: Call) {
    const visit = visitOf(call, zone);
    if (visit === null) return;
    takenJobId.current ??= (await takeJob.mutateAsync(newJobSchema.parse(call))).id;
    await bookVisit.mutateAsync({ jobId: takenJobId.current, visit });
    await navigate(`/jobs/${takenJobId.current}`);
  }

  return useCheckedForm({
    schema: callSchema,
    defaultValues: { machineId, complaint: '', callsBackJobId: null, ...blankVisit(zone) },
    save,
    fieldNames: VISIT_FIELDS,
  });
}

const EVERY_JOB = { find: '', state: '', technician: '', callbacks: '' };

export function CallForm({ machine }: { machine: Machine }) {
  const { zone } = useSession().shop;
  const nowMs = useNowMs();
  const form = useCallForm(machine.id);
  const { register, fault } = form;
  const jobs = useQuery(jobsQuery({ ...EVERY_JOB, find: machine.serial }));
  const earlier = jobs.data?.filter((job) => job.machine.id === machine.id) ?? [];
  return (
    <section>
      <ErrorSummary problems={form.problems} attempt={form.attempt} />
      <FormFrame form={form} doer="Take the call" leave="/jobs">
        <SectionHead>What is wrong</SectionHead>
        <div className="pt-3 pb-8">
          <Cells>
            <TextAreaField
              label="Complaint, in the customer’s words"
              {...register('complaint')}
              error={fault('complaint')}
            />
            {earlier.length > 0 && (
              <SelectField
                label="Calls back an earlier job on this machine"
                {...register('callsBackJobId', {
                  setValueAs: (id: string | null) => (id === '' ? null : id),
                })}
                error={fault('callsBackJobId')}
              >
                <option value="">No, this is a new complaint</option>
                {earlier.map((job) => (
                  <option key={job.id} value={job.id}>
                    {job.number}, {dateWords(job.takenAtMs, zone, nowMs)}, {quoted(job.complaint)}
                  </option>
                ))}
              </SelectField>
            )}
          </Cells>
        </div>
        <SectionHead>First visit</SectionHead>
        <div className="pt-3">
          <VisitCells form={form} />
        </div>
      </FormFrame>
    </section>
  );
}
