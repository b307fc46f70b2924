import { parse } from 'yaml';
import type { Audit, Tree } from './audit.ts';

interface Service {
  image?: string;
  command?: string[];
  environment?: Record<string, string | number>;
  depends_on?: Record<string, unknown> | string[];
}

const needed = ['postgres', 'migrate', 'api', 'worker', 'mail'];
const file = 'docker-compose.yml';

function servicesOf(tree: Tree): Record<string, Service> | string {
  if (!tree.files.includes(file)) return `${file}: it is missing`;
  try {
    return parse(tree.read(file), { merge: true })?.services ?? {};
  } catch (error) {
    return `${file}: ${error instanceof Error ? error.message : String(error)}`;
  }
}

function problemsOf(tree: Tree, name: string, service: Service): string[] {
  const problems: string[] = [];
  const [entry] = service.command ?? [];
  if (entry !== undefined && !tree.files.includes(entry))
    problems.push(`${name} runs ${entry}, which does not exist`);
  for (const [key, value] of Object.entries(service.environment ?? {})) {
    const secret = /(?:PASSWORD|SECRET)$/.test(key) || /:\/\/[^@/]*:[^@/]*@/.test(String(value));
    if (secret && !/\$\{\w+/.test(String(value)))
      problems.push(`${name} holds a secret in ${key}: take it from the environment`);
    if (key === 'FARLUG_LOCAL')
      problems.push(`${name} sets ${key}: the demo accounts and the mailbox page are for one machine`);
  }
  if (/(?:api|worker)/.test(name) && /farlug_owner/.test(String(service.environment?.DATABASE_URL))) {
    problems.push(`${name} connects as the owner, to whom row-level security does not apply`);
  }
  return problems.map((problem) => `${file}: ${problem}`);
}

export const audit: Audit = {
  name: 'the deployment runs what exists, without secrets of its own',
  find: (tree) => {
    const services = servicesOf(tree);
    if (typeof services === 'string') return [services];
    return [
      ...needed.filter((name) => !services[name]).map((name) => `${file}: there is no service "${name}"`),
      ...Object.entries(services).flatMap(([name, service]) => problemsOf(tree, name, service)),
    ];
  },
};
