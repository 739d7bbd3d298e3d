import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { createQueryClient } from './api/query-client.ts';
import './styles.css';

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no #root');

// A customer opens one page and goes nowhere from it: it comes without the router and all that stands behind it.
const Page =
  window.location.pathname === '/shared'
    ? (await import('./pages/customer/customer-page.tsx')).CustomerPage
    : (await import('./application.tsx')).Application;

createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={createQueryClient()}>
      <Page />
    </QueryClientProvider>
  </StrictMode>,
);
