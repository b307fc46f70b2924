import { spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, realpathSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { featureFiles } from './feature-files.ts';
import { root, tool } from './gate/stage.ts';

let copy: string;
const workspaces = ['packages/solver', 'packages/contract', 'packages/db', 'apps/api', 'apps/web'];

// A copy of the sources in which the packages are found by path, so that the new files see each other.
beforeAll(() => {
  copy = realpathSync(mkdtempSync(path.join(tmpdir(), 'farlug-feature-')));
  symlinkSync(path.join(root, 'node_modules'), path.join(copy, 'node_modules'));
  for (const workspace of workspaces) {
    cpSync(path.join(root, workspace, 'src'), path.join(copy, workspace, 'src'), { recursive: true });
    symlinkSync(path.join(root, workspace, 'node_modules'), path.join(copy, workspace, 'node_modules'));
  }
});
afterAll(() => rmSync(copy, { recursive: true, force: true }));

const contract = ['route', 'routes', 'rows', 'edit', 'errors'];

/** What the compiler says about files of the feature; it starts from them and follows their imports. */
function typeErrors(files: string[]): string[] {
  const source = path.join(copy, 'packages/contract/src');
  const paths = Object.fromEntries(
    contract.map((name) => [
      `@farlug/contract/${name}`,
      [`${source}/${name}.ts`, `${source}/${name}/index.ts`],
    ]),
  );
  const config = {
    extends: path.join(root, 'apps/web/tsconfig.json'),
    compilerOptions: {
      types: ['node'],
      typeRoots: [path.join(root, 'node_modules/@types')],
      paths: { ...paths, '@farlug/db': [path.join(copy, 'packages/db/src/index.ts')] },
    },
    files: [...files, 'apps/api/src/http/express-types.d.ts'],
    include: [],
  };
  writeFileSync(path.join(copy, 'tsconfig.json'), JSON.stringify(config));
  const { stdout } = spawnSync(tool('tsc'), ['-p', copy, '--pretty', 'false'], { encoding: 'utf8' });
  return stdout.split('\n').filter((line) => line.includes('price-book'));
}

function write(file: string, text: string, flag: 'w' | 'a' = 'w'): void {
  mkdirSync(path.dirname(path.join(copy, file)), { recursive: true });
  writeFileSync(path.join(copy, file), text, { flag });
}

it('a new feature compiles in every layer', () => {
  const files = featureFiles('price-book');
  for (const [file, text] of Object.entries(files)) write(file, text);
  write('packages/contract/src/routes/index.ts', "export * from './price-book.ts';\n", 'a');
  write('packages/db/src/index.ts', "export * from './queries/price-book.ts';\n", 'a');
  // A mistake beside them shows that the compiler has read them.
  const mistaken = 'packages/contract/src/routes/price-book-mistaken.ts';
  write(
    mistaken,
    "import { listPriceBook } from './price-book.ts';\nexport const path: number = listPriceBook.path;\n",
  );
  expect(typeErrors([...Object.keys(files), mistaken])).toEqual([
    expect.stringMatching(/price-book-mistaken\.ts\(2,14\): error TS2322/),
  ]);
});
