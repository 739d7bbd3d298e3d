import type { ComponentType } from 'react';
import { Outlet, ScrollRestoration, type RouteObject } from 'react-router-dom';
import { RouteError } from './pages/frame/route-error.tsx';

/** A page in a chunk of its own; a defect in it stays inside the frame. */
function page(load: () => Promise<ComponentType>, path: string): RouteObject {
  return { path, lazy: lazily(load), ErrorBoundary: RouteError };
}

/**
 * A chunk that cannot be fetched becomes a page that throws: the router leaves the screen empty where a lazy route
 * rejects, whereas a thrown error reaches the route's boundary.
 */
function lazily(load: () => Promise<ComponentType>) {
  return { Component: () => load().catch(throwing) };
}

function throwing(error: unknown): ComponentType {
  return function Unfetched(): never {
    throw error;
  };
}

/** Drawn before the first page's chunk is there. */
function Opening() {
  return (
    <p role="status" className="words px-4 py-6 text-[1.125rem] text-print desk:px-12">
      Opening…
    </p>
  );
}

function Root() {
  return (
    <>
      <ScrollRestoration />
      <Outlet />
    </>
  );
}

const deskPages: RouteObject[] = [
  page(async () => (await import('./pages/jobs/jobs-page.tsx')).JobsPage, 'jobs'),
  page(async () => (await import('./pages/jobs/take-call-page.tsx')).TakeCallPage, 'jobs/new'),
  page(async () => (await import('./pages/job/job-page.tsx')).JobPage, 'jobs/:id'),
  page(
    async () => (await import('./pages/job/book-visit-page.tsx')).BookVisitPage,
    'jobs/:id/visits/new',
  ),
  page(async () => (await import('./pages/homes/homes-page.tsx')).HomesPage, 'homes'),
  page(async () => (await import('./pages/homes/new-home-page.tsx')).NewHomePage, 'homes/new'),
  page(async () => (await import('./pages/homes/home-page.tsx')).HomePage, 'homes/:id'),
  page(
    async () => (await import('./pages/homes/edit-home-page.tsx')).EditHomePage,
    'homes/:id/edit',
  ),
  page(
    async () => (await import('./pages/homes/edit-customer-page.tsx')).EditCustomerPage,
    'customers/:id/edit',
  ),
  page(
    async () => (await import('./pages/machine/new-machine-page.tsx')).NewMachinePage,
    'homes/:id/machines/new',
  ),
  page(async () => (await import('./pages/machine/machine-page.tsx')).MachinePage, 'machines/:id'),
  page(
    async () => (await import('./pages/machine/edit-machine-page.tsx')).EditMachinePage,
    'machines/:id/edit',
  ),
  page(
    async () => (await import('./pages/machine/fit-part-page.tsx')).FitPartPage,
    'machines/:id/parts/new',
  ),
  page(
    async () => (await import('./pages/machine/remove-part-page.tsx')).RemovePartPage,
    'machines/:id/parts/:partId/out',
  ),
  page(
    async () => (await import('./pages/machine/specify-page.tsx')).SpecifyPage,
    'machines/:id/specified/:setting',
  ),
  page(async () => (await import('./pages/ratings/ratings-page.tsx')).RatingsPage, 'ratings'),
  page(
    async () => (await import('./pages/ratings/rating-form-page.tsx')).NewRatingPage,
    'ratings/new',
  ),
  page(
    async () => (await import('./pages/ratings/rating-form-page.tsx')).EditRatingPage,
    'ratings/:id',
  ),
  page(
    async () => (await import('./pages/ratings/probe-form-page.tsx')).NewProbePage,
    'probes/new',
  ),
  page(
    async () => (await import('./pages/ratings/probe-form-page.tsx')).EditProbePage,
    'probes/:id',
  ),
  page(
    async () => (await import('./pages/ratings/calibrations-page.tsx')).CalibrationsPage,
    'probes/:id/calibrations',
  ),
  page(
    async () => (await import('./pages/ratings/calibration-form-page.tsx')).NewCalibrationPage,
    'probes/:id/calibrations/new',
  ),
  page(async () => (await import('./pages/shop/shop-page.tsx')).ShopPage, 'shop'),
  page(
    async () => (await import('./pages/shop/add-person-page.tsx')).AddPersonPage,
    'shop/people/new',
  ),
  page(async () => (await import('./pages/account/account-page.tsx')).AccountPage, 'account'),
  page(async () => (await import('./pages/account/more-page.tsx')).MorePage, 'more'),
  page(async () => (await import('./pages/unsent/unsent-page.tsx')).UnsentPage, 'unsent'),
  page(async () => (await import('./pages/run/run-page.tsx')).RunPage, 'runs/:id'),
];

/** Site screens bring their own top bar and deck; on a desk the places stand above them. */
const sitePages: RouteObject[] = [
  page(async () => (await import('./pages/rounds/rounds-page.tsx')).RoundsPage, 'rounds'),
  page(async () => (await import('./pages/visit/visit-page.tsx')).VisitPage, 'visits/:id'),
  page(
    async () => (await import('./pages/upload/upload-page.tsx')).UploadPage,
    'visits/:id/upload',
  ),
];

const notFoundPage = page(
  async () => (await import('./pages/not-found/not-found-page.tsx')).NotFoundPage,
  '*',
);

export const routes: RouteObject[] = [
  {
    Component: Root,
    HydrateFallback: Opening,
    ErrorBoundary: RouteError,
    children: [
      page(async () => (await import('./pages/sign-in/sign-in-page.tsx')).SignInPage, 'sign-in'),
      {
        lazy: lazily(async () => (await import('./pages/frame/signed-in.tsx')).SignedIn),
        ErrorBoundary: RouteError,
        children: [
          {
            index: true,
            lazy: lazily(async () => (await import('./pages/frame/first-page.tsx')).FirstPage),
          },
          { handle: { isSite: true }, children: sitePages },
          ...deskPages,
          notFoundPage,
        ],
      },
    ],
  },
];
