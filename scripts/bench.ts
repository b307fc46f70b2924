// `npm run bench [-- WORD]`: every benchmark, or those whose path holds the word. They report; they never fail a build.
import { spawnSync } from 'node:child_process';
import { projectTree } from './audit.ts';
import { root } from './gate/stage.ts';

const word = process.argv[2] ?? '';
const files = projectTree(root).files.filter(
  (file) => /\/bench\/[^/]+\.bench\.ts$/.test(file) && file.includes(word),
);

if (files.length === 0) {
  process.stderr.write(`no benchmark has "${word}" in its path\n`);
  process.exitCode = 1;
}
for (const file of files) {
  process.stdout.write(`\n${file}\n`);
  spawnSync(process.execPath, ['--import', 'tsx', file], { cwd: root, stdio: 'inherit' });
}
