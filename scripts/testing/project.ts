import { fileURLToPath } from 'node:url';
import type { UserWorkspaceConfig } from 'vitest/config';

type ProjectTest = NonNullable<UserWorkspaceConfig['test']>;

const here = (file: string): string => fileURLToPath(new URL(file, import.meta.url));
const deep = process.env.FARLUG_DEEP === '1';

/** What every test project has in common; `own` says the rest and wins. */
export function project(name: string, own: ProjectTest = {}): { test: ProjectTest } {
  return {
    test: {
      name,
      include: ['{src,test}/**/*.test.{ts,tsx}'],
      env: { TZ: 'UTC' },
      restoreMocks: true,
      testTimeout: deep ? 600_000 : 30_000,
      hookTimeout: 60_000,
      ...own,
      setupFiles: [here('./unexpected-console.ts'), ...[own.setupFiles ?? []].flat()],
    },
  };
}

/** A project whose tests use real PostgreSQL: the cluster runs before the first of them. */
export function databaseProject(name: string, own: ProjectTest = {}): { test: ProjectTest } {
  return project(name, { globalSetup: [here('./test-cluster.ts')], ...own });
}

/** Whole journeys in a real browser, one after the other, against the running product. */
export function journeyProject(name: string): { test: ProjectTest } {
  return project(name, {
    include: ['**/*.test.ts'],
    globalSetup: [here('./running-product.ts')],
    fileParallelism: false,
    testTimeout: deep ? 600_000 : 240_000,
    hookTimeout: 120_000,
  });
}
