// Global setup of the journeys: the whole product, as `npm start` runs it, on an empty database in the tests' cluster.
// The journeys read FARLUG_URL and CHROMIUM_PATH.
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { TEST_API_PASSWORD, TEST_WORKER_PASSWORD } from '../../packages/db/src/testing/index.ts';
import { ensureChromium } from '../chromium.ts';
import { emptyTestDatabase, useCluster } from '../cluster.mjs';
import { root } from '../gate/stage.ts';
import { freePort } from '../port.mjs';
import { launch } from '../product/product.ts';
import { keptSecrets } from '../product/secrets.ts';
import { buildWeb } from '../product/web-build.ts';

export default async function setup(): Promise<(() => Promise<void>) | undefined> {
  process.env.CHROMIUM_PATH = ensureChromium();
  if (process.env.FARLUG_URL) return undefined;
  await buildWeb();
  const cluster = await useCluster('test');
  const directory = mkdtempSync(path.join(tmpdir(), 'farlug-journeys-'));
  const product = await launch({
    port: await freePort(),
    ownerUrl: await emptyTestDatabase(`farlug_journeys_${process.pid}`),
    secrets: {
      ...keptSecrets(directory),
      API_PASSWORD: TEST_API_PASSWORD,
      WORKER_PASSWORD: TEST_WORKER_PASSWORD,
    },
    mailDirectory: path.join(directory, 'mail'),
    log: path.join(root, '.data/test-logs/product.log'),
  });
  process.env.FARLUG_URL = product.address;
  return async () => {
    delete process.env.FARLUG_URL;
    await product.stop();
    await cluster.release();
    rmSync(directory, { recursive: true, force: true });
  };
}
