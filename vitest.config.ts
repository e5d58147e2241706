import { defineConfig } from 'vitest/config';

const withDatabase = { globalSetup: ['tests/support/global-setup.ts'], pool: 'forks' as const };

// Sized for two cores. Projects run one after another (groupOrder), the quick ones first.
export default defineConfig({
  test: {
    passWithNoTests: false,
    projects: [
      {
        test: {
          name: 'physics',
          include: ['tests/{physics,reference,shared}/**/*.test.ts'],
          pool: 'threads',
          maxWorkers: 2,
          testTimeout: 30_000,
          sequence: { groupOrder: 0 },
        },
      },
      {
        test: {
          ...withDatabase,
          name: 'server',
          include: ['tests/server/**/*.test.ts'],
          maxWorkers: 2,
          testTimeout: 30_000,
          hookTimeout: 60_000,
          sequence: { groupOrder: 1 },
        },
      },
      {
        test: {
          ...withDatabase,
          name: 'scripts',
          include: ['tests/scripts/**/*.test.ts'],
          maxWorkers: 1,
          fileParallelism: false,
          testTimeout: 60_000,
          sequence: { groupOrder: 2 },
        },
      },
      {
        test: {
          ...withDatabase,
          name: 'browser',
          include: ['tests/browser/**/*.test.ts'],
          maxWorkers: 1,
          fileParallelism: false,
          testTimeout: 120_000,
          hookTimeout: 180_000,
          // A browser shares its machine with everything else: what fails there must fail twice.
          retry: 1,
          sequence: { groupOrder: 3 },
        },
      },
    ],
  },
});
