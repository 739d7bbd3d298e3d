import { useQuery } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import { JOB_STATES } from '#shared/schemas/jobs.ts';
import { jobsQuery } from '../../api/jobs.ts';
import { techniciansQuery } from '../../api/people.ts';
import { Cells, SelectField, TextField, TickField } from '../../components/field.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { KeyLink } from '../../components/key-link.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { JOB_STATE_WORDS } from '../../format/job-words.ts';
import { mayRunOffice, useSession } from '../frame/session-context.ts';
import { EmptyJobs } from './empty-jobs.tsx';
import { askedFilter, isNarrowed, isShown, useJobFilter, type ShownFilter } from './job-filter.ts';
import { JobsTable } from './jobs-table.tsx';

export function JobsPage() {
  const session = useSession();
  const { filter, change } = useJobFilter();
  const jobs = useQuery(jobsQuery(askedFilter(filter)));

  const shown = jobs.data?.filter((job) => isShown(job, filter));
  const isEmptyShop = jobs.data?.length === 0 && !isNarrowed(filter);
  return (
    <DeskPage>
      <div className="grid grid-cols-[minmax(0,1fr)_auto] items-end gap-x-3 gap-y-3 pb-3 wide:grid-cols-[auto_minmax(0,1fr)_auto] wide:gap-x-8 wide:pb-5">
        <PageHeading className="pb-0 wide:pb-2 wide:text-[2.75rem] wide:leading-none">
          Jobs
        </PageHeading>
        <div className="order-last col-span-full wide:order-none wide:col-span-1">
          <Seek filter={filter} onChange={change} mayPickTechnician={mayRunOffice(session)} />
        </div>
        {mayRunOffice(session) && (
          <KeyLink to="/jobs/new" face="main" className="min-h-touch wide:min-h-key">
            Take a call
          </KeyLink>
        )}
      </div>
      {jobs.isPending && <Waiting>Fetching the jobs…</Waiting>}
      {jobs.isError && <Failed error={jobs.error} onRetry={jobs.refetch} />}
      {isEmptyShop && <EmptyJobs mayTake={mayRunOffice(session)} />}
      {shown && !isEmptyShop && <JobsTable jobs={shown} session={session} filter={filter} />}
    </DeskPage>
  );
}

type SeekProps = {
  filter: ShownFilter;
  onChange: (name: keyof ShownFilter, value: string) => void;
  mayPickTechnician: boolean;
};

function Seek({ filter, onChange, mayPickTechnician }: SeekProps) {
  return (
    <search>
      <Cells
        className={
          mayPickTechnician
            ? 'grid-cols-3 wide:grid-cols-[minmax(0,1fr)_160px_180px_150px]'
            : 'grid-cols-2 wide:grid-cols-[minmax(0,1fr)_160px_150px]'
        }
      >
        <FindCell find={filter.find} onChange={(find) => onChange('find', find)} />
        <SelectField
          label="State"
          name="state"
          value={filter.state}
          onChange={(event) => onChange('state', event.target.value)}
        >
          <option value="">All open</option>
          {JOB_STATES.map((state) => (
            <option key={state} value={state}>
              {JOB_STATE_WORDS[state]}
            </option>
          ))}
          <option value="all">All, closed too</option>
        </SelectField>
        {mayPickTechnician && (
          <TechnicianCell
            technician={filter.technician}
            onChange={(technician) => onChange('technician', technician)}
          />
        )}
        <CallbacksCell
          isOnly={filter.callbacks === 'yes'}
          onChange={(isOnly) => onChange('callbacks', isOnly ? 'yes' : '')}
        />
      </Cells>
    </search>
  );
}

type CallbacksCellProps = { isOnly: boolean; onChange: (isOnly: boolean) => void };

/** Ticked at once, though the address that says so follows a moment later. */
function CallbacksCell({ isOnly, onChange }: CallbacksCellProps) {
  const [ticked, setTicked] = useState(isOnly);
  const [seen, setSeen] = useState(isOnly);
  if (isOnly !== seen) {
    setSeen(isOnly);
    setTicked(isOnly);
  }
  return (
    <TickField
      label="Callbacks"
      name="callbacks"
      tick="only"
      checked={ticked}
      onChange={(event) => {
        setTicked(event.target.checked);
        onChange(event.target.checked);
      }}
    />
  );
}

const REST_MS = 250;

/** What is typed stands at once; it is searched for when the typing rests. A search from elsewhere replaces it. */
function FindCell({ find, onChange }: { find: string; onChange: (find: string) => void }) {
  const [typed, setTyped] = useState(find);
  const [seen, setSeen] = useState(find);
  const [sent, setSent] = useState(find);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  if (find !== seen) {
    setSeen(find);
    if (find !== sent) setTyped(find);
  }
  useEffect(() => () => clearTimeout(timer.current), []);

  function search(words: string) {
    clearTimeout(timer.current);
    if (words === sent) return;
    setSent(words);
    onChange(words);
  }

  function handleChange(words: string) {
    setTyped(words);
    clearTimeout(timer.current);
    timer.current = setTimeout(() => search(words), REST_MS);
  }

  return (
    <TextField
      label="Find by name, street, number, make or serial"
      name="find"
      type="search"
      autoComplete="off"
      value={typed}
      onChange={(event) => handleChange(event.target.value)}
      // Before a click elsewhere counts: a search that began after it would call the click's way off.
      onBlur={() => search(typed)}
      className="col-span-full wide:col-span-1"
    />
  );
}

function TechnicianCell({
  technician,
  onChange,
}: {
  technician: string;
  onChange: (technician: string) => void;
}) {
  const technicians = useQuery(techniciansQuery());
  return (
    <SelectField
      label="Technician"
      name="technician"
      value={technician}
      onChange={(event) => onChange(event.target.value)}
    >
      <option value="">Anyone</option>
      {technicians.data?.map(({ id, name }) => (
        <option key={id} value={id}>
          {name}
        </option>
      ))}
    </SelectField>
  );
}
