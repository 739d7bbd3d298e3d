import { StrictMode, type ComponentType } from 'react';
import { createRoot } from 'react-dom/client';
import './styles.css';

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no #root');

/** Two pages come without the router and all that stands behind it: who opens them goes nowhere else meanwhile. */
async function rootOf(pathname: string): Promise<ComponentType> {
  if (pathname === '/shared')
    return (await import('./pages/customer/customer-root.tsx')).CustomerRoot;
  if (/^\/visits\/[^/]+\/stopwatch\/?$/.test(pathname))
    return (await import('./pages/stopwatch/stopwatch-root.tsx')).StopwatchRoot;
  return (await import('./application.tsx')).Application;
}

const Page = await rootOf(window.location.pathname);

createRoot(root).render(
  <StrictMode>
    <Page />
  </StrictMode>,
);
