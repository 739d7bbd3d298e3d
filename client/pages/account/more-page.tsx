import { Link } from 'react-router-dom';
import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { useSession } from '../frame/session-context.ts';

/** The phone's fourth key: the places that have no key of their own. */
export function MorePage() {
  const { person, shop } = useSession();
  const places = [
    { to: '/ratings', name: 'Ratings', about: 'thermostats, limits, fuses, and probes' },
    ...(person.role === 'owner'
      ? [{ to: '/shop', name: 'Shop', about: 'people, name and address, units' }]
      : []),
    { to: '/unsent', name: 'On this phone', about: 'what is not sent yet' },
    { to: '/account', name: person.name, about: 'password, signing out' },
  ];
  return (
    <DeskPage>
      <PageHeading>More</PageHeading>
      <p className="lab pt-1 pb-4">{[shop.name, shop.town].filter(Boolean).join(', ')}</p>
      <ul className="max-w-form border-t-line border-print">
        {places.map(({ to, name, about }) => (
          <li key={to} className="border-b border-hair">
            <Link to={to} className="group block py-3.5 no-underline">
              <span className="block font-gothic text-section-site underline decoration-1 underline-offset-[0.2em]">
                {name}
              </span>
              <span className="words text-print">{about}</span>
            </Link>
          </li>
        ))}
      </ul>
    </DeskPage>
  );
}
