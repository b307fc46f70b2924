import { type ChildProcess, spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';

export const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');

export interface Check {
  name: string;
  passed: number;
  failed: number;
  /** What a person needs to mend it; shown when something failed. */
  detail?: string;
}

export interface Stage {
  name: string;
  run: () => Promise<Check[]>;
}

export interface Finished {
  code: number;
  output: string;
}

export function verdict(name: string, problems: readonly string[]): Check {
  const failed = problems.length > 0;
  return { name, passed: failed ? 0 : 1, failed: failed ? 1 : 0, detail: problems.join('\n') };
}

const running = new Set<ChildProcess>();

/** For whoever is told to stop in the middle of its work. */
export function stopCommands(): void {
  for (const child of running) child.kill('SIGTERM');
}

/** Runs a program to its end and keeps what it said. */
export function command(
  program: string,
  args: readonly string[],
  env: NodeJS.ProcessEnv = {},
): Promise<Finished> {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, {
      cwd: root,
      env: { ...process.env, ...env },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    running.add(child);
    const chunks: Buffer[] = [];
    child.stdout.on('data', (chunk: Buffer) => chunks.push(chunk));
    child.stderr.on('data', (chunk: Buffer) => chunks.push(chunk));
    child.once('error', reject);
    child.once('close', (code) => {
      running.delete(child);
      resolve({ code: code ?? 1, output: Buffer.concat(chunks).toString() });
    });
  });
}

/** The path of a program that the root's packages bring. */
export function tool(name: string): string {
  return `${root}/node_modules/.bin/${name}`;
}
