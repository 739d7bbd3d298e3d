import type { ReactNode } from 'react';
import { Link, useLocation } from 'react-router-dom';
import { FuseMark } from './signs.tsx';
import { ThemeWord } from './theme-word.tsx';

/** A place of the application; `covers` names the addresses that belong to it beside its own. */
export type Place = { to: string; name: string; covers?: string[] };

function isUnder(pathname: string, to: string) {
  return pathname === to || pathname.startsWith(`${to}/`);
}

/** Which place an address belongs to; undefined for one of none. */
export function placeOf(pathname: string, places: Place[]): Place | undefined {
  return places.find(({ to, covers = [] }) =>
    [to, ...covers].some((address) => isUnder(pathname, address)),
  );
}

/** "page" on the place itself, "true" on what belongs to it. */
function currentWord(pathname: string, place: Place, current: Place | undefined) {
  if (place.to !== current?.to) return undefined;
  return pathname === place.to ? 'page' : 'true';
}

export function SkipLink() {
  return (
    <a href="#main" className="word absolute top-1 left-2 z-20 bg-paper px-3 not-focus:sr-only">
      Skip to the page
    </a>
  );
}

function DeskPlace({ place, places }: { place: Place; places: Place[] }) {
  const { pathname } = useLocation();
  const current = currentWord(pathname, place, placeOf(pathname, places));
  return (
    <Link
      to={place.to}
      aria-current={current}
      className={`relative flex items-center px-4 font-gothic text-[1.0625rem] leading-none font-stretch-[98%] no-underline ${current ? 'font-bold text-ink after:absolute after:inset-x-4 after:-bottom-px after:h-[5px] after:bg-ink' : 'font-medium text-print'}`}
    >
      {place.name}
    </Link>
  );
}

/** The head of a desk page: brand, the places, who is signed in, and the theme. `isSite`: not on a phone. */
export function DeskHead({
  places,
  who,
  isSite,
}: {
  places: Place[];
  who: string;
  isSite: boolean;
}) {
  return (
    <header
      className={`${isSite ? 'hidden desk:flex' : 'flex'} h-14 items-stretch border-b border-print pr-2 pl-4 desk:h-[60px] desk:px-12 print:hidden`}
    >
      <Link
        to="/"
        className="inline-flex items-center gap-3 font-gothic text-[1.25rem] leading-none font-semibold font-stretch-[112%] tracking-[-0.005em] no-underline desk:mr-11"
      >
        <FuseMark />
        Fusekeeper
      </Link>
      <nav aria-label="Main" className="hidden desk:flex">
        {places.map((place) => (
          <DeskPlace key={place.to} place={place} places={places} />
        ))}
      </nav>
      <div className="ml-auto flex items-center gap-5">
        <Link
          to="/account"
          className="hidden min-h-10 items-center font-gothic text-[1rem] leading-none font-medium text-print no-underline hover:underline wide:inline-flex"
        >
          {who}
        </Link>
        <ThemeWord />
      </div>
    </header>
  );
}

const PHONE_PLACES: Place[] = [
  { to: '/rounds', name: 'Rounds', covers: ['/visits'] },
  { to: '/jobs', name: 'Jobs', covers: ['/runs'] },
  { to: '/homes', name: 'Homes', covers: ['/machines', '/customers'] },
  { to: '/more', name: 'More', covers: ['/ratings', '/probes', '/shop', '/account'] },
];

/** Phone: four keys on the deck. */
export function PhoneTabs() {
  const { pathname } = useLocation();
  const here = placeOf(pathname, PHONE_PLACES);
  return (
    <nav
      aria-label="Main"
      className="sticky bottom-0 z-10 grid grid-cols-4 gap-2 border-t-bar border-ink bg-deck px-3 pt-2.5 pb-[max(14px,env(safe-area-inset-bottom))] desk:hidden print:hidden"
    >
      {PHONE_PLACES.map((place) => {
        const current = currentWord(pathname, place, here);
        return (
          <Link
            key={place.to}
            to={place.to}
            aria-current={current}
            className={`grid min-h-14 place-items-center rounded-key border-line font-gothic text-press leading-none font-stretch-[96%] no-underline ${current ? 'border-ink bg-ink text-paper' : 'border-print bg-key'}`}
          >
            {place.name}
          </Link>
        );
      })}
    </nav>
  );
}

/** The body of a desk page: one column of full-width bands. */
export function DeskPage({
  children,
  className = '',
}: {
  children: ReactNode;
  className?: string;
}) {
  return (
    <main id="main" className={`px-4 pt-4 pb-10 desk:px-12 desk:pt-[22px] desk:pb-16 ${className}`}>
      {children}
    </main>
  );
}

type SitePageProps = {
  /** Where the arrow at the top left leads; none where the page is a place of its own. */
  back?: { to: string; name: string };
  /** Who and where, in the top bar; a heading may stand here instead. */
  top: ReactNode;
  children: ReactNode;
  /** Keys at the thumb. */
  deck?: ReactNode;
  /** On a desk it takes the whole width: offices use it as well. */
  isWide?: boolean;
};

/** A site screen: paper above, keys below, at most 480 px wide. */
export function SitePage({ back, top, children, deck, isWide = false }: SitePageProps) {
  const width = isWide ? '' : 'max-w-site desk:border-x desk:border-print';
  return (
    <main
      id="main"
      className={`mx-auto grid min-h-dvh grid-cols-[minmax(0,1fr)] grid-rows-[auto_1fr_auto] bg-paper desk:min-h-[calc(100dvh-60px)] ${width}`}
    >
      <header
        className={`flex min-h-14 items-center gap-1 border-b border-print pr-2 pl-1 print:hidden ${isWide ? 'desk:px-9' : ''}`}
      >
        {back && (
          <Link
            to={back.to}
            className="inline-flex min-h-touch min-w-12 items-center gap-2 px-2 font-gothic text-[1.0625rem] leading-none font-semibold no-underline before:ml-1 before:size-[10px] before:rotate-45 before:border-b-[2.5px] before:border-l-[2.5px] before:border-current before:content-['']"
          >
            {back.name}
          </Link>
        )}
        <div className={`min-w-0 flex-1 ${back ? '' : 'pl-3'}`}>{top}</div>
        <ThemeWord className="desk:hidden" />
      </header>
      <div className="min-w-0">{children}</div>
      {deck}
    </main>
  );
}
