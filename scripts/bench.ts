// `npm run bench [-- WORD] [--write]`: every benchmark, or those whose path holds the word. They report; they never
// fail a build. `--write` keeps what they print beside them, as NAME.timings.txt.
import { spawn } from 'node:child_process';
import { createWriteStream } from 'node:fs';
import { cpus } from 'node:os';
import path from 'node:path';
import { projectTree } from './audit.ts';
import { root } from './gate/stage.ts';

const args = process.argv.slice(2);
const write = args.includes('--write');
const word = args.find((arg) => arg !== '--write') ?? '';
const files = projectTree(root).files.filter(
  (file) => /\/bench\/[^/]+\.bench\.ts$/.test(file) && file.includes(word),
);

if (files.length === 0) {
  process.stderr.write(`no benchmark has "${word}" in its path\n`);
  process.exitCode = 1;
}
for (const file of files) {
  process.stdout.write(`\n${file}\n`);
  const kept = write ? createWriteStream(path.join(root, file.replace('.bench.ts', '.timings.txt'))) : null;
  kept?.write(`${process.platform}, ${cpus().length} processors, Node.js ${process.versions.node}\n`);
  const child = spawn(process.execPath, ['--import', 'tsx', file], {
    cwd: root,
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  child.stdout.on('data', (chunk: Buffer) => {
    process.stdout.write(chunk);
    kept?.write(chunk);
  });
  await new Promise((ended) => child.on('close', ended));
  kept?.end();
}
