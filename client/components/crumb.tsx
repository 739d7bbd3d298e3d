import { Link } from 'react-router-dom';

/** What a page belongs to, over its heading. */
export function Crumb({ to, children }: { to: string; children: React.ReactNode }) {
  return (
    <p className="lab">
      <Link to={to} className="inline-flex min-h-touch items-center desk:min-h-10">
        {children}
      </Link>
    </p>
  );
}
