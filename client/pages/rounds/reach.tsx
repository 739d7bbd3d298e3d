import { Link } from 'react-router-dom';
import type { RoundsItem } from '#shared/schemas/jobs.ts';

const REACH =
  'inline-flex min-h-[50px] min-w-12 items-center font-gothic text-[1.03125rem] leading-[1.1] font-semibold font-stretch-[92%] underline-offset-[.28em]';

/** One tap to the address in the phone's own map, to the phone, and to the machine. */
export function Reach({ job }: Pick<RoundsItem, 'job'>) {
  const { home, customer, machine } = job;
  const place = [home.address, home.town].filter(Boolean).join(', ');
  return (
    <div className="mt-1.5 flex flex-wrap gap-x-[22px]">
      <a className={REACH} href={`geo:0,0?q=${encodeURIComponent(place)}`}>
        <span className="sr-only">Map: </span>
        {home.address}
      </a>
      {customer.phone && (
        <a className={REACH} href={`tel:${customer.phone.replace(/[^+\d]/g, '')}`}>
          <span className="sr-only">Call </span>
          {customer.phone}
        </a>
      )}
      <Link className={REACH} to={`/machines/${machine.id}`}>
        Machine
      </Link>
    </div>
  );
}
