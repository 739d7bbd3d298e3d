import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { VitePWA } from 'vite-plugin-pwa';
import { defineConfig } from 'vitest/config';

/** What opens the application without a server. The client registers it itself: see client/device/versions.ts. */
const worker = VitePWA({
  // A new version waits until the person takes it; a running measurement is never dropped.
  registerType: 'prompt',
  injectRegister: false,
  manifest: false,
  workbox: {
    globPatterns: ['index.html', 'theme.js', 'assets/*.{js,css}', 'assets/*latin-*.woff2'],
    // A customer opens one page, with a line to the shop.
    globIgnores: ['assets/customer-*'],
    navigateFallback: '/index.html',
    navigateFallbackDenylist: [/^\/api\//, /^\/shared(\/|$)/, /\/[^/]+\.[a-z0-9]+$/i],
    clientsClaim: true,
    cleanupOutdatedCaches: true,
    // One file: under the content policy a worker loads no second script.
    inlineWorkboxRuntime: true,
    sourcemap: false,
  },
});

/**
 * What many pages share comes as few files: forty small ones pack worse and ask forty times. The customer's page takes
 * the first two, so that nothing of the device may stand in them.
 */
const sharedChunks = [
  { name: 'react', test: /node_modules\/(react|react-dom|scheduler)\//, priority: 3 },
  {
    name: 'components',
    test: /client\/(components\/(caution-ticks|field|glyphs|key|key-face|notice|section-head|signs|theme-word)|api\/(http|matches))\.tsx?$/,
    priority: 2,
  },
  {
    name: 'device',
    // Without what joins the device to the queries, and without engine and live probes: the stopwatch opens without those.
    test: /node_modules\/idb\/|client\/device\/(?!engine\/|live\/|join-queries|kept-runs|page-age|start-with-queries|use-)/,
    priority: 1,
  },
  {
    name: 'begin',
    // What the pages of the stopwatch share, before a run and in it.
    test: /client\/pages\/stopwatch\/(choice|lazy-live|press|probe-options|settings-form|sounds)\.tsx?$|shared\/recorder\/rhythm\.ts$/,
    priority: 1,
  },
];

export default defineConfig({
  plugins: [react(), tailwindcss(), worker],
  publicDir: 'client/public',
  worker: { format: 'es' },
  build: {
    outDir: 'dist/client',
    target: 'es2022',
    manifest: true,
    assetsInlineLimit: 0,
    rolldownOptions: { output: { codeSplitting: { groups: sharedChunks } } },
  },
  test: {
    projects: [
      {
        extends: true,
        // Pure, by the rules of shared/: files of tests need not be kept apart, and load it once.
        test: { name: 'shared', include: ['tests/shared/**/*.test.ts'], isolate: false },
      },
      {
        extends: true,
        test: {
          name: 'server',
          include: ['tests/server/**/*.test.ts'],
          globalSetup: ['tests/support/built-workers.ts'],
        },
      },
      { extends: true, test: { name: 'client', include: ['tests/client/**/*.test.ts'] } },
    ],
    environment: 'node',
    setupFiles: ['tests/support/fail-on-console-error.ts'],
    testTimeout: 60_000,
    maxWorkers: 2,
  },
});
