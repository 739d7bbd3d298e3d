import { QueryClientProvider } from '@tanstack/react-query';
import { createQueryClient } from '../../api/query-client.ts';
import { CustomerPage } from './customer-page.tsx';

const queryClient = createQueryClient();

/** The customer's page on its own. */
export function CustomerRoot() {
  return (
    <QueryClientProvider client={queryClient}>
      <CustomerPage />
    </QueryClientProvider>
  );
}
