import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const source = fileURLToPath(new URL('../src', import.meta.url));
const FOLDERS = ['equations', 'job', 'judge', 'linear', 'network', 'sizing', 'tables', 'what-if'];
/** ECMA-262 leaves every other function of Math, and powers, to the engine. */
const EXACT = ['abs', 'ceil', 'floor', 'max', 'min', 'round', 'sign', 'sqrt', 'trunc', 'PI', 'SQRT2'];

const files = FOLDERS.flatMap((folder) =>
  readdirSync(join(source, folder), { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith('.ts') && !name.endsWith('.test.ts'))
    .map((name) => join(folder, name)),
);

describe('what is calculated with is the same to the last bit in every engine', () => {
  it.each(files)('%s', (file) => {
    const code = readFileSync(join(source, file), 'utf8').replace(/\/\*[\s\S]*?\*\/|\/\/.*/g, '');
    const used = [...code.matchAll(/\bMath\.(\w+)/g)].map(([, name]) => name!);
    expect(used.filter((name) => !EXACT.includes(name))).toEqual([]);
    expect(code).not.toMatch(/\*\*/);
  });
});
