import { QueryClientProvider } from '@tanstack/react-query';
import { createBrowserRouter, RouterProvider } from 'react-router-dom';
import { createQueryClient } from './api/query-client.ts';
import { joinQueries } from './device/join-queries.ts';
import { askAgain } from './device/page-age.ts';
import { startDevice } from './device/start-device.ts';
import { routes } from './routes.tsx';

const queryClient = createQueryClient();
startDevice((url) => askAgain(queryClient, [url]));
joinQueries(queryClient);
const router = createBrowserRouter(routes);

/** Everything behind the sign-in, and the sign-in itself. */
export function Application() {
  return (
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  );
}
