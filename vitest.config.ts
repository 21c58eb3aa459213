import { defineConfig } from 'vitest/config';

/** Cheap first: engine and house need nothing; services and routes the local stack; browser the built product; bench and soak have their own commands. */
export default defineConfig({
  resolve: { alias: { '@': import.meta.dirname } },
  test: {
    projects: [
      { extends: true, test: { name: 'engine', include: ['tests/engine/**/*.test.ts'] } },
      {
        extends: true,
        test: { name: 'house', include: ['tests/house/**/*.test.ts'], testTimeout: 120_000, hookTimeout: 120_000 },
      },
      {
        extends: true,
        test: {
          name: 'services',
          setupFiles: ['tests/support/stack.ts'],
          include: ['tests/services/**/*.test.ts'],
          testTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'routes',
          setupFiles: ['tests/support/stack.ts'],
          include: ['tests/routes/**/*.test.ts'],
          testTimeout: 60_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          setupFiles: ['tests/support/stack.ts'],
          include: ['tests/browser/**/*.test.ts'],
          testTimeout: 240_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
      {
        extends: true,
        test: {
          name: 'bench',
          setupFiles: ['tests/support/stack.ts'],
          include: [],
          benchmark: { include: ['tests/bench/**/*.bench.ts'] },
          fileParallelism: false,
        },
      },
      {
        extends: true,
        test: {
          name: 'soak',
          setupFiles: ['tests/support/stack.ts'],
          include: ['tests/soak/**/*.test.ts'],
          testTimeout: 3_600_000,
          hookTimeout: 600_000,
          fileParallelism: false,
        },
      },
    ],
  },
});
