import { useQuery } from '@tanstack/react-query';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { jobQuery, useBookVisit } from '../../api/jobs.ts';
import { DeskPage } from '../../components/frame.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import {
  blankVisit,
  typedVisitSchema,
  VISIT_FIELDS,
  VisitCells,
  visitOf,
} from '../../forms/visit-form.tsx';
import { machineWords } from '../../format/job-words.ts';
import { useSession } from '../frame/session-context.ts';

export function BookVisitPage() {
  const { id = '' } = useParams();
  const { zone } = useSession().shop;
  const job = useQuery(jobQuery(id));
  const bookVisit = useBookVisit();
  const navigate = useNavigate();
  const form = useCheckedForm({
    schema: typedVisitSchema,
    defaultValues: blankVisit(zone),
    fieldNames: VISIT_FIELDS,
    save: async (typed) => {
      const visit = visitOf(typed, zone);
      if (visit === null) return;
      await bookVisit.mutateAsync({ jobId: id, visit });
      await navigate(`/jobs/${id}`);
    },
  });
  const where = job.data && `${job.data.customer.name}, ${job.data.home.address}`;
  return (
    <DeskPage>
      <FormHead
        form={form}
        title="Book a visit"
        above={
          <p className="lab">
            <Link to={`/jobs/${id}`} className="inline-flex min-h-touch items-center desk:min-h-10">
              Job {job.data?.number}
            </Link>
          </p>
        }
        lead={where && `${where}. ${machineWords(job.data.machine)}.`}
      />
      <FormFrame form={form} doer="Book the visit" leave={`/jobs/${id}`}>
        <VisitCells form={form} />
      </FormFrame>
    </DeskPage>
  );
}
