import path from 'node:path';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const alias = {
  '@': path.resolve(import.meta.dirname),
  'server-only': path.resolve(import.meta.dirname, 'tests/support/server-only.ts'),
};

/** `unit` and `reference` are pure; `ui` renders in jsdom; `database` wants the MariaDB that scripts/test.mjs starts. */
export default defineConfig({
  test: {
    projects: [
      {
        resolve: { alias },
        test: {
          name: 'unit',
          environment: 'node',
          // Property tests run hundreds of cases; on a busy machine the usual 5 seconds are short.
          testTimeout: 30_000,
          include: ['tests/{solver,reference,canvas,app,scripts,house}/**/*.test.ts'],
        },
      },
      {
        plugins: [react()],
        resolve: { alias },
        test: {
          name: 'ui',
          environment: 'jsdom',
          include: ['tests/**/*.test.tsx'],
          setupFiles: ['tests/support/jsdom.ts'],
          testTimeout: 30_000,
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'database',
          environment: 'node',
          include: ['tests/{db,server}/**/*.test.ts'],
          fileParallelism: false,
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
    ],
  },
});
