import type { Audit, Tree } from './audit.ts';

const documents = ['README.md', 'DEVELOPERS.md'];
const roots = /^(?:apps|packages|scripts|fixtures|docs|docker|\.ci)\//;

/** Paths in backticks; a segment in capitals or angle brackets stands for a name that the reader chooses. */
function mentioned(text: string): string[] {
  return [...text.matchAll(/`([^`\s]+)`/g)].map((match) => match[1] ?? '').filter((path) => roots.test(path));
}

function exists(tree: Tree, path: string): boolean {
  const pattern = path
    .replace(/\/$/, '')
    .replace(/[.+^$()|[\]\\]/g, '\\$&')
    .replace(/<[^>]+>|\*+|\bNAME\b|\bNNNN\b/g, '[^/]+')
    .replace(/\{([^}]+)\}/g, (_whole, list: string) => `(?:${list.split(',').join('|')})`);
  const known = new RegExp(`^${pattern}(?:/|$)`);
  return tree.files.some((file) => known.test(file));
}

export const audit: Audit = {
  name: 'every path in the documents exists',
  find: (tree) =>
    documents
      .filter((file) => tree.files.includes(file))
      .flatMap((file) =>
        mentioned(tree.read(file))
          .filter((path) => !exists(tree, path))
          .map((path) => `${file}: \`${path}\` does not exist`),
      ),
};
