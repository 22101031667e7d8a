import { defineConfig } from 'vitest/config';

const root = new URL('..', import.meta.url).pathname;

/** One project a kind of test; the browser tests are Playwright's, the client's Angular's. */
const project = (name: string, include: string[], testTimeout: number) => ({
  root,
  test: { name, include, environment: 'node' as const, pool: 'forks' as const, testTimeout,
    hookTimeout: 120_000 },
});

export default defineConfig({
  root,
  test: {
    maxWorkers: 2,
    projects: [
      project('unit', ['shared/**/*.spec.ts', 'server/**/*.spec.ts', 'database/**/*.spec.ts',
        'scripts/**/*.spec.ts'], 30_000),
      project('standards', ['tests/standards/**/*.spec.ts'], 30_000),
      project('api', ['tests/api/**/*.spec.ts'], 60_000),
      project('jobs', ['tests/jobs/**/*.spec.ts'], 60_000),
      project('migrations', ['tests/migrations/**/*.spec.ts'], 120_000),
      project('faults', ['tests/faults/**/*.spec.ts'], 300_000),
    ],
  },
});
