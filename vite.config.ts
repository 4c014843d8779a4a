import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const api = `http://127.0.0.1:${process.env['API_PORT'] ?? '4180'}`;

export default defineConfig({
  plugins: [react()],
  build: { outDir: 'dist', license: true, assetsInlineLimit: 0 },
  server: {
    host: '127.0.0.1',
    strictPort: true,
    // The host as the browser names it, so that the server knows its own pages.
    proxy: { '/api': { target: api, changeOrigin: false }, '/mail': { target: api, changeOrigin: false } },
    watch: { ignored: ['**/.grainward/**'] },
  },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          environment: 'node',
          include: ['tests/unit/**/*.test.ts', 'tests/standards/**/*.test.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'client',
          environment: 'jsdom',
          include: ['tests/client/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/client/setup.ts'],
          // A table of hundreds of rows is slow to draw in jsdom on a machine that is busy.
          testTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'server',
          environment: 'node',
          include: ['tests/{api,database,faults,dossier,seed}/**/*.test.ts'],
          testTimeout: 60_000,
          hookTimeout: 120_000,
          maxWorkers: 2,
          // Projects with different numbers of workers run one after the other.
          sequence: { groupOrder: 1 },
        },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          environment: 'node',
          include: ['tests/browser/**/*.test.ts'],
          testTimeout: 300_000,
          hookTimeout: 180_000,
          maxWorkers: 1,
          sequence: { groupOrder: 2 },
        },
      },
    ],
  },
});
