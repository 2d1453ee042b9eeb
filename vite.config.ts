import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';
import type { Plugin } from 'vite';

/**
 * dagre and graphlib look for `require` before they ask for their own parts, and for `window` otherwise. The bundle
 * holds the parts, and a worker has neither: the question is answered here.
 */
function dagreInWorkers(): Plugin {
  return {
    name: 'dagre-in-workers',
    transform: (code, id) =>
      /node_modules\/(dagre|graphlib)\//.test(id) && code.includes('typeof require === "function"')
        ? { code: code.replaceAll('typeof require === "function"', 'true'), map: null }
        : null,
  };
}

/** One file configures the client build, the server bundle (`vite build --ssr`) and the tests. */
export default defineConfig(({ isSsrBuild }) => ({
  plugins: [react(), tailwindcss()],
  worker: { format: 'es', plugins: () => [dagreInWorkers()] },
  // The server lists no data folders for the watcher: a database file that changes must not reload a page.
  server: { watch: { ignored: ['**/.data/**', '**/.data-test/**', '**/.cache/**'] } },
  build: {
    outDir: isSsrBuild ? 'dist/server' : 'dist/client',
    assetsInlineLimit: 0,
    target: isSsrBuild ? 'node20' : 'es2022',
  },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          environment: 'node',
          include: [
            'shared/**/*.test.ts',
            'server/**/*.test.ts',
            'seeders/**/*.test.ts',
            'tests/house/**/*.test.ts',
            'tests/golden/**/*.test.ts',
            'src/**/*.node.test.ts',
          ],
        },
      },
      {
        extends: true,
        test: {
          name: 'client',
          environment: 'jsdom',
          include: ['src/**/*.test.ts', 'src/**/*.test.tsx'],
          exclude: ['src/**/*.node.test.ts'],
          setupFiles: ['tests/support/client-setup.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'api',
          environment: 'node',
          include: ['tests/api/**/*.test.ts'],
          globalSetup: ['tests/support/api-global-setup.ts'],
          maxWorkers: 2,
          testTimeout: 30_000,
          hookTimeout: 120_000,
        },
      },
    ],
  },
}));
