import type { Audit, Tree } from './audit.ts';

interface Manifest {
  dependencies?: Record<string, string>;
  devDependencies?: Record<string, string>;
  peerDependencies?: Record<string, string>;
}

function looseVersions(tree: Tree, file: string): string[] {
  const manifest = JSON.parse(tree.read(file)) as Manifest;
  const all = { ...manifest.peerDependencies, ...manifest.devDependencies, ...manifest.dependencies };
  return Object.entries(all)
    .filter(([, version]) => version !== 'catalog:' && version !== 'workspace:*')
    .map(
      ([name, version]) =>
        `${file}: ${name} is "${version}": write "catalog:" and its version in pnpm-workspace.yaml`,
    );
}

/** The entries of the catalog: `name: version`, indented, up to the next key. */
function catalog(workspace: string): [string, string][] {
  const block = workspace.split(/^catalog:\s*$/m)[1]?.split(/^\S/m)[0] ?? '';
  return [...block.matchAll(/^\s+['"]?([^'":]+)['"]?:\s*(\S+)\s*$/gm)].map((match) => [
    match[1] ?? '',
    match[2] ?? '',
  ]);
}

function rangesIn(tree: Tree): string[] {
  const entries = catalog(tree.read('pnpm-workspace.yaml'));
  if (entries.length === 0) return ['pnpm-workspace.yaml: the catalog is empty or could not be read'];
  return entries
    .filter(([, version]) => !/^\d+\.\d+\.\d+(?:-[\w.]+)?$/.test(version))
    .map(([name, version]) => `pnpm-workspace.yaml: ${name} is "${version}": give one exact version`);
}

function hostsIn(tree: Tree): string[] {
  const found = /\bhttps?:\/\/\S+|\btarball:/.exec(tree.read('pnpm-lock.yaml'));
  return found
    ? [`pnpm-lock.yaml: an address stands in it (${found[0]}): it would tie every clone to one host`]
    : [];
}

export const audit: Audit = {
  name: 'every version stands once, exactly, in the catalog',
  find: (tree) => [
    ...tree.files
      .filter((file) => /(?:^|\/)package\.json$/.test(file))
      .flatMap((file) => looseVersions(tree, file)),
    ...rangesIn(tree),
    ...hostsIn(tree),
  ],
};
