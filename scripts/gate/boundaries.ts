import { readFileSync } from 'node:fs';
import path from 'node:path';
import { cruise, type ICruiseResult, type IModule } from 'dependency-cruiser';
import config, { unreachable } from '../../.dependency-cruiser.mjs';
import { type Check, root, type Stage, verdict } from './stage.ts';

interface Reach {
  name: string;
  comment: string;
  from: string;
  to: string;
}

export const boundaries: Stage = {
  name: 'boundaries',
  run: () => checkBoundaries(root, ['packages', 'apps', 'scripts']),
};

/** One check for each rule, and one that modules were seen at all. */
export async function checkBoundaries(baseDir: string, folders: readonly string[]): Promise<Check[]> {
  const { output } = await cruise([...folders], {
    ...config.options,
    baseDir,
    validate: true,
    ruleSet: config,
  });
  if (typeof output === 'string') throw new Error(`dependency-cruiser answered in words: ${output}`);
  return [
    seen(output),
    ...(config.forbidden ?? []).map((rule) => obeyed(rule, output)),
    ...unreachable.map((rule) => unreached(rule, output.modules, baseDir)),
  ];
}

function seen(result: ICruiseResult): Check {
  const own = result.modules.filter(({ source }) => /^(packages|apps)\//.test(source));
  const linked = own.filter(({ dependencies }) => dependencies.length > 0);
  return verdict(
    'modules were seen',
    linked.length > 0 ? [] : ['no module with an import was seen: the parser is missing'],
  );
}

function obeyed(rule: { name?: string; comment?: string }, result: ICruiseResult): Check {
  const broken = result.summary.violations.filter((violation) => violation.rule.name === rule.name);
  const problems = broken.map(({ from, to, cycle }) =>
    cycle ? `${from} → ${cycle.map(({ name }) => name).join(' → ')}` : `${from} → ${to}`,
  );
  return verdict(`${rule.name}`, problems.length > 0 ? [...problems, `(${rule.comment})`] : []);
}

function unreached(rule: Reach, modules: readonly IModule[], baseDir: string): Check {
  const bySource = new Map(modules.map((module) => [module.source, module]));
  const from = new RegExp(rule.from);
  const entries = modules
    .map(({ source }) => source)
    .filter((source) => from.test(source) && !/\.test\.tsx?$/.test(source));
  const found = findPath(entries, new RegExp(rule.to), bySource, baseDir);
  return verdict(rule.name, found ? [found.join(' → '), `(${rule.comment})`] : []);
}

/**
 * Breadth first over what is loaded at once: neither imports on demand nor types. The parser does not tell types apart,
 * so the statement itself is read.
 */
function findPath(
  entries: readonly string[],
  to: RegExp,
  modules: Map<string, IModule>,
  baseDir: string,
): string[] | undefined {
  const cameFrom = new Map<string, string | undefined>(entries.map((entry) => [entry, undefined]));
  for (const source of cameFrom.keys()) {
    for (const dependency of modules.get(source)?.dependencies ?? []) {
      if (dependency.dynamic || isErased(source, dependency.module, baseDir)) continue;
      if (!cameFrom.has(dependency.resolved)) cameFrom.set(dependency.resolved, source);
      if (to.test(dependency.resolved)) return trail(dependency.resolved, cameFrom);
    }
  }
  return undefined;
}

function isErased(source: string, module: string, baseDir: string): boolean {
  const name = module.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
  const statements = new RegExp(
    `(?:import|export)\\b[^;]*?\\bfrom\\s*['"]${name}['"]|import\\s*['"]${name}['"]`,
    'g',
  );
  const found = readFileSync(path.join(baseDir, source), 'utf8').match(statements) ?? [];
  return found.length > 0 && found.every((statement) => /^(?:import|export)\s+type\b/.test(statement));
}

function trail(end: string, cameFrom: Map<string, string | undefined>): string[] {
  const steps: string[] = [];
  for (let at: string | undefined = end; at !== undefined; at = cameFrom.get(at)) steps.unshift(at);
  return steps;
}
