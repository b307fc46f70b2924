import type { Audit, Tree } from './audit.ts';

const notFeatures = new Set(['index', 'common']);

function names(tree: Tree, pattern: RegExp): Set<string> {
  const found = tree.files.map((file) => pattern.exec(file)?.[1]).filter((name) => name !== undefined);
  return new Set(found.filter((name) => !notFeatures.has(name)));
}

/** A part of the browser that calls no route (a view of the open job) has a name of its own. */
function callsRoutes(tree: Tree, feature: string): boolean {
  return tree.files.some(
    (file) =>
      file.startsWith(`apps/web/src/features/${feature}/`) &&
      /\.tsx?$/.test(file) &&
      /from '@farlug\/contract\/routes'/.test(tree.read(file)),
  );
}

export const audit: Audit = {
  name: 'a feature has one name in contract, api and web',
  find: (tree) => {
    const contract = names(tree, /^packages\/contract\/src\/routes\/([a-z-]+)\.ts$/);
    const api = names(tree, /^apps\/api\/src\/features\/([a-z-]+)\//);
    const web = names(tree, /^apps\/web\/src\/features\/([a-z-]+)\//);
    if (contract.size === 0) return ['packages/contract/src/routes: there is no feature'];
    return [
      ...[...contract]
        .filter((name) => !api.has(name))
        .map((name) => `apps/api/src/features: "${name}" of the contract is missing`),
      ...[...api]
        .filter((name) => !contract.has(name))
        .map((name) => `packages/contract/src/routes: "${name}" of the api is missing`),
      ...[...web]
        .filter((name) => !contract.has(name) && callsRoutes(tree, name))
        .map(
          (name) =>
            `apps/web/src/features/${name}: it calls routes, and none are named "${name}" in the contract`,
        ),
    ];
  },
};
