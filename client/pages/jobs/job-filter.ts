import { useSearchParams } from 'react-router-dom';
import type { JobListItem } from '#shared/schemas/jobs.ts';
import type { JobFilter } from '../../api/jobs.ts';

/** As it stands in the address. `state`: empty for every open job, `all` for every job. */
export type ShownFilter = JobFilter;

/** The filter lives in the address, so that a link or the way back shows the same table. */
export function useJobFilter() {
  const [search, setSearch] = useSearchParams();
  const filter: ShownFilter = {
    find: search.get('find') ?? '',
    state: search.get('state') ?? '',
    technician: search.get('technician') ?? '',
    callbacks: search.get('callbacks') ?? '',
  };
  function change(name: keyof ShownFilter, value: string) {
    setSearch(
      (before) => {
        const next = new URLSearchParams(before);
        if (value === '') next.delete(name);
        else next.set(name, value);
        return next;
      },
      { replace: true },
    );
  }
  return { filter, change };
}

/** What is asked of the server: it knows single states, the page knows "open". */
export function askedFilter(filter: ShownFilter): JobFilter {
  return { ...filter, state: filter.state === 'all' ? '' : filter.state };
}

export function isShown(job: Pick<JobListItem, 'state'>, filter: ShownFilter): boolean {
  return filter.state !== '' || job.state !== 'closed';
}

export function isNarrowed(filter: ShownFilter): boolean {
  return Object.values(filter).some((value) => value !== '');
}
