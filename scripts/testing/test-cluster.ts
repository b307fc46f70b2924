// Global setup of the projects that need PostgreSQL. `npm test` starts the cluster once and passes TEST_PG_URL;
// a single test file run by hand starts (and afterwards stops) it here.
import { useCluster } from '../cluster.mjs';

export default async function setup(): Promise<(() => Promise<void>) | undefined> {
  if (process.env.TEST_PG_URL) return undefined;
  const cluster = await useCluster('test');
  process.env.TEST_PG_URL = cluster.url;
  return async () => {
    delete process.env.TEST_PG_URL;
    await cluster.release();
  };
}
