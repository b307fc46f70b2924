// `npm start`: PostgreSQL, migrations, the built pages, api, worker and a local mail sink, behind one port.
import path from 'node:path';
import { useCluster } from './cluster.mjs';
import { root } from './gate/stage.ts';
import { portNumber } from './port.mjs';
import { lastLines, launch } from './product/product.ts';
import { keptSecrets } from './product/secrets.ts';
import { buildWeb } from './product/web-build.ts';
import { printWelcome } from './product/welcome.ts';

const log = path.join(root, '.data/product.log');
const closers: (() => Promise<void>)[] = [];
let closing = false;

async function close(code: number): Promise<never> {
  closing = true;
  while (closers.length > 0) await closers.pop()?.().catch(report);
  process.exit(code);
}

function report(error: unknown): void {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
}

async function timed<T>(what: string, work: Promise<T>): Promise<T> {
  const began = performance.now();
  const result = await work;
  process.stdout.write(
    `${what.padEnd(32)}${((performance.now() - began) / 1000).toFixed(1).padStart(6)} s\n`,
  );
  return result;
}

const codes = { SIGINT: 130, SIGTERM: 143, SIGHUP: 129 } as const;
for (const signal of Object.keys(codes) as (keyof typeof codes)[]) {
  process.on(signal, () => {
    if (closing) return;
    process.stdout.write('\nstopping\n');
    void close(codes[signal]);
  });
}

async function start(): Promise<void> {
  process.stdout.write(
    `${'packages'.padEnd(32)}${(process.env.FARLUG_INSTALL_SECONDS ?? '0.0').padStart(6)} s\n`,
  );
  const starting = useCluster('work');
  closers.push(async () => (await starting).release());
  const [cluster] = await Promise.all([timed('PostgreSQL', starting), timed('pages', buildWeb())]);
  const launching = launch({
    port: portNumber(process.env.PORT),
    ownerUrl: cluster.url,
    secrets: keptSecrets(`${root}/.data`),
    mailDirectory: `${root}/.data/mail`,
    log,
    onStarted: (stop) => closers.push(stop),
  });
  const product = await timed('database, api and worker', launching);
  printWelcome(product.address, path.relative(process.cwd(), log));
  const broken = await product.broken;
  if (closing) return;
  process.stderr.write(`\n${lastLines(log)}\n\n${broken}: stopping the rest\n`);
  await close(1);
}

await start().catch(async (error: unknown) => {
  if (closing) return;
  report(error);
  await close(1);
});
