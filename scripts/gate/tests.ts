import { useCluster } from '../cluster.mjs';
import type { Stage } from './stage.ts';
import { runProjects } from './vitest.ts';

const projects = [
  { name: 'scripts', folder: 'scripts' },
  { name: 'solver', folder: 'packages/solver' },
  { name: 'contract', folder: 'packages/contract' },
  { name: 'db', folder: 'packages/db' },
  { name: 'api', folder: 'apps/api' },
  { name: 'web', folder: 'apps/web/src' },
];

export const tests: Stage = {
  name: 'unit, property, reference, database and API',
  run: async () => {
    const cluster = await useCluster('test');
    try {
      return await runProjects('tests', projects, { TEST_PG_URL: cluster.url });
    } finally {
      await cluster.release();
    }
  },
};
