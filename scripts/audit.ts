import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';

/** The project's own files, by path from the root; an audit's test hands in a few made-up ones. */
export interface Tree {
  files: string[];
  read: (file: string) => string;
}

export interface Audit {
  /** What holds when nothing is found. */
  name: string;
  /** One line for each breach: where, and what would be right. */
  find: (tree: Tree) => string[];
}

/** What git tracks or would track: nothing installed, built or generated. */
export function projectTree(root: string): Tree {
  const listed = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard', '-z'], {
    cwd: root,
    maxBuffer: 64 * 1024 * 1024,
  });
  const files = [...new Set(listed.toString().split('\0'))]
    .filter((file) => file !== '' && existsSync(path.join(root, file)))
    .sort();
  return { files, read: (file) => readFileSync(path.join(root, file), 'utf8') };
}

export function treeOf(contents: Record<string, string>): Tree {
  return {
    files: Object.keys(contents).sort(),
    read: (file) => {
      const text = contents[file];
      if (text === undefined) throw new Error(`no such file in the sample: ${file}`);
      return text;
    },
  };
}

export function isTest(file: string): boolean {
  return /\.test\.tsx?$/.test(file) || file.startsWith('apps/web/e2e/');
}

/** Each line of a file with its place, as `path:line`. */
export function lines(tree: Tree, file: string): { at: string; text: string }[] {
  return tree
    .read(file)
    .split('\n')
    .map((text, index) => ({ at: `${file}:${index + 1}`, text }));
}
