import { QueryClientProvider } from '@tanstack/react-query';
import { createBrowserRouter, RouterProvider } from 'react-router-dom';
import { applicationQueries } from './api/application-queries.ts';
import { routes } from './routes.tsx';

const router = createBrowserRouter(routes);

/** Everything behind the sign-in, and the sign-in itself. */
export function Application() {
  return (
    <QueryClientProvider client={applicationQueries}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  );
}
