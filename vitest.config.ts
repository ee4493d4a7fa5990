import { defineConfig } from 'vitest/config';

const shared = {
  resolve: { tsconfigPaths: true },
  test: {
    environment: 'node' as const,
    pool: 'forks' as const,
    alias: { 'server-only': new URL('./tests/helpers/empty.ts', import.meta.url).pathname },
  },
};

export default defineConfig({
  test: {
    maxWorkers: 2,
    projects: [
      {
        ...shared,
        test: {
          ...shared.test,
          name: 'unit',
          include: [
            '{solver,lib,db,components,app,scripts}/**/*.test.{ts,tsx}',
            'tests/boundaries.test.ts',
            'tests/cli/**/*.test.ts',
          ],
        },
      },
      {
        ...shared,
        test: {
          ...shared.test,
          name: 'verification',
          include: ['tests/{verification,golden}/**/*.test.ts'],
          testTimeout: 120_000,
        },
      },
      {
        ...shared,
        test: {
          ...shared.test,
          name: 'integration',
          include: ['tests/integration/**/*.test.ts'],
          globalSetup: ['tests/integration/global-setup.ts'],
          setupFiles: ['tests/integration/setup.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
          fileParallelism: false,
        },
      },
    ],
  },
});
