import { defineConfig } from 'vitest/config';

process.env.TZ = 'UTC';

export default defineConfig({
  test: {
    projects: [
      'packages/*/vitest.config.ts',
      'apps/*/vitest.config.ts',
      'apps/web/e2e/vitest.config.ts',
      'scripts/vitest.config.ts',
    ],
    maxWorkers: 2,
  },
});
