import type { Audit, Tree } from './audit.ts';

function problemsOf(tree: Tree, file: string): string[] {
  let content: unknown;
  try {
    content = JSON.parse(tree.read(file));
  } catch {
    return [`${file}: it is not JSON`];
  }
  const source = (content as { source?: unknown } | null)?.source;
  const said = typeof source === 'string' ? source : JSON.stringify(source ?? '');
  return said.replace(/[^\p{L}]/gu, '').length >= 8
    ? []
    : [`${file}: "source" must say where the numbers come from`];
}

export const audit: Audit = {
  name: 'every reference number says where it comes from',
  find: (tree) => {
    const files = tree.files.filter((file) => /^fixtures\/reference\/.+\.json$/.test(file));
    if (files.length === 0) return ['fixtures/reference: there is no reference value'];
    return files.flatMap((file) => problemsOf(tree, file));
  },
};
