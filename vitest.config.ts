import { defineConfig } from 'vitest/config';

const setupFiles = [new URL('.ci/fail-on-console-error.ts', import.meta.url).pathname];

/** One project per kind of test; `npx vitest run --project engine` runs one of them. */
export default defineConfig({
  test: {
    allowOnly: !process.env.CI,
    coverage: { provider: 'v8', include: ['engine/src/**', 'server/src/**', 'studio/src/**'] },
    projects: [
      {
        test: {
          name: 'engine',
          environment: 'node',
          include: ['engine/{src,worker,cli,bench}/**/*.test.ts', 'examples/**/*.test.ts'],
          setupFiles,
          testTimeout: 20_000,
        },
      },
      {
        // Outside checks: slower by nature, some start another program.
        test: {
          name: 'validation',
          environment: 'node',
          include: ['engine/validation/**/*.test.ts'],
          setupFiles,
          testTimeout: 120_000,
        },
      },
      {
        test: {
          name: 'server',
          environment: 'node',
          include: ['server/src/**/*.test.ts'],
          setupFiles,
          testTimeout: 20_000,
        },
      },
      {
        // Without a DOM: setting one up takes longer than most of these tests.
        test: {
          name: 'studio',
          root: 'studio',
          environment: 'node',
          include: ['src/**/*.test.ts'],
          setupFiles,
          testTimeout: 15_000,
        },
      },
      {
        test: {
          name: 'studio-dom',
          root: 'studio',
          environment: 'jsdom',
          // Testing Library unmounts after each test only where it finds a global afterEach.
          globals: true,
          include: ['src/**/*.test.tsx'],
          setupFiles,
          testTimeout: 15_000,
        },
      },
      { test: { name: 'runner', environment: 'node', include: ['.ci/*.test.ts'], setupFiles } },
    ],
  },
});
