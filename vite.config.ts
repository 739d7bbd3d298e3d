import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

export default defineConfig({
  plugins: [react(), tailwindcss()],
  publicDir: 'client/public',
  build: { outDir: 'dist/client', target: 'es2022', manifest: true, assetsInlineLimit: 0 },
  test: {
    include: ['tests/{shared,server,client}/**/*.test.ts'],
    environment: 'node',
    setupFiles: ['tests/support/fail-on-console-error.ts'],
    testTimeout: 20_000,
    maxWorkers: 2,
  },
});
