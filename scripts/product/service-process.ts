import { type ChildProcess, spawn } from 'node:child_process';
import { closeSync, openSync } from 'node:fs';
import path from 'node:path';
import { root } from '../gate/stage.ts';

export interface ServiceProcess {
  name: string;
  /** Resolves when the process has ended, with how it ended in words. */
  ended: Promise<string>;
  stop: () => Promise<void>;
}

const secondsToFinish = 10;

/**
 * Starts one program of the product. It is no part of the terminal's process group, so that Ctrl-C reaches only
 * the one who started it, and it ends by itself when that one is killed.
 */
export function startService(
  name: string,
  file: string,
  env: NodeJS.ProcessEnv,
  log: string,
): ServiceProcess {
  const output = openSync(log, 'a');
  const child = spawn(
    process.execPath,
    ['--import', 'tsx', '--import', path.join(root, 'scripts/product/follow-parent.mjs'), file],
    {
      cwd: root,
      env: { ...process.env, TSX_TSCONFIG_PATH: path.join(root, 'apps/api/tsconfig.json'), ...env },
      stdio: ['ignore', output, output, 'ipc'],
      detached: true,
    },
  );
  closeSync(output);
  child.channel?.unref();
  const ended = new Promise<string>((resolve) => {
    child.once('error', (error) => resolve(error.message));
    child.once('exit', (code, signal) => resolve(signal ? `ended by ${signal}` : `ended with code ${code}`));
  });
  return { name, ended, stop: () => stop(child, ended) };
}

async function stop(child: ChildProcess, ended: Promise<string>): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  child.kill('SIGTERM');
  const timer = setTimeout(() => child.kill('SIGKILL'), secondsToFinish * 1000);
  await ended;
  clearTimeout(timer);
}
