import path from 'node:path';
import type { Audit, Tree } from './audit.ts';

const link = /!?\[[^\]]*\]\(([^)\s]+)(?:\s+"[^"]*")?\)/g;

function slug(heading: string): string {
  return heading
    .trim()
    .toLowerCase()
    .replace(/[^\p{L}\p{N}\s-]/gu, '')
    .replace(/\s/g, '-');
}

function anchors(markdown: string): string[] {
  return [...markdown.matchAll(/^#+\s+(.+)$/gm)].map((match) => slug(match[1] ?? ''));
}

function brokenTarget(tree: Tree, from: string, target: string): string | undefined {
  const [place = '', anchor] = target.split('#');
  const file = place === '' ? from : path.posix.normalize(path.posix.join(path.posix.dirname(from), place));
  const folder = file.endsWith('/') ? file : `${file}/`;
  if (tree.files.some((known) => known.startsWith(folder))) return undefined;
  if (!tree.files.includes(file)) return `nothing stands at ${file}`;
  if (anchor === undefined || !file.endsWith('.md') || anchors(tree.read(file)).includes(anchor))
    return undefined;
  return `${file} has no heading for #${anchor}`;
}

export const audit: Audit = {
  name: 'every link in the documents leads somewhere',
  find: (tree) =>
    tree.files
      .filter((file) => file.endsWith('.md'))
      .flatMap((file) =>
        [...tree.read(file).matchAll(link)].flatMap(([, target = '']) => {
          if (/^(https?|mailto):/.test(target)) return [];
          const broken = brokenTarget(tree, file, target);
          return broken ? [`${file}: (${target}): ${broken}`] : [];
        }),
      ),
};
