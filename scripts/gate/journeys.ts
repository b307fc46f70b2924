import { ensureChromium } from '../chromium.ts';
import { useCluster } from '../cluster.mjs';
import type { Stage } from './stage.ts';
import { runProjects } from './vitest.ts';

export const journeys: Stage = {
  name: 'journeys in a real browser',
  run: async () => {
    process.env.CHROMIUM_PATH = ensureChromium();
    const cluster = await useCluster('test');
    try {
      return await runProjects('journeys', [{ name: 'e2e', folder: 'apps/web/e2e' }], {
        TEST_PG_URL: cluster.url,
      });
    } finally {
      await cluster.release();
    }
  },
};
