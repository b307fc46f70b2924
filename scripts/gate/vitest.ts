import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { type Check, command, root, tool } from './stage.ts';

interface FileReport {
  name: string;
  status: string;
  message: string;
  assertionResults: { status: string; fullName: string }[];
}

/** Runs the named projects in one vitest; `owns` says by path which project a test file belongs to. */
export async function runProjects(
  label: string,
  projects: readonly { name: string; folder: string }[],
  env: NodeJS.ProcessEnv = {},
): Promise<Check[]> {
  const logs = path.join(root, '.data/test-logs');
  mkdirSync(logs, { recursive: true });
  const report = path.join(logs, `${label}.json`);
  rmSync(report, { force: true });
  const chosen = projects.flatMap(({ name }) => ['--project', name]);
  const args = ['run', ...chosen, '--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
  const { code, output } = await command(tool('vitest'), args, { ...env, NO_COLOR: '1' });
  writeFileSync(path.join(logs, `${label}.log`), output);
  return summarise(projects, readReport(report), code, output);
}

function readReport(file: string): FileReport[] {
  try {
    return JSON.parse(readFileSync(file, 'utf8')).testResults;
  } catch {
    return [];
  }
}

/** A file that could not be loaded, a skipped test and a project without tests each count as a failure. */
export function summarise(
  projects: readonly { name: string; folder: string }[],
  files: readonly FileReport[],
  code: number,
  output: string,
): Check[] {
  const checks = projects.map(({ name, folder }): Check => {
    const own = files.filter((file) => path.relative(root, file.name).startsWith(`${folder}/`));
    const results = own.flatMap((file) => file.assertionResults);
    const passed = results.filter(({ status }) => status === 'passed').length;
    const unloaded = own.filter(
      (file) => file.status === 'failed' && !file.assertionResults.some(({ status }) => status === 'failed'),
    );
    const failed = results.length - passed + unloaded.length;
    if (passed + failed === 0) return { name, passed: 0, failed: 1, detail: `${name}: no test was run` };
    return { name, passed, failed };
  });
  const failed = checks.some((check) => check.failed > 0);
  const last = checks.at(-1);
  if (code !== 0 && !failed) checks.push({ name: 'vitest itself', passed: 0, failed: 1, detail: output });
  else if (failed && last) last.detail = [last.detail ?? '', output].join('\n').trim();
  return checks;
}
