import { createBrowserRouter, RouterProvider } from 'react-router-dom';
import { routes } from './routes.tsx';

const router = createBrowserRouter(routes);

/** Everything behind the sign-in, and the sign-in itself. */
export function Application() {
  return <RouterProvider router={router} />;
}
