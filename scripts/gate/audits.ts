import { readdirSync } from 'node:fs';
import path from 'node:path';
import { type Audit, projectTree } from '../audit.ts';
import { type Check, root, type Stage, verdict } from './stage.ts';

/** Every scripts/check-*.ts is an audit; a new one needs no registration. */
export async function findAudits(): Promise<Audit[]> {
  const scripts = path.join(root, 'scripts');
  const files = readdirSync(scripts).filter((file) => /^check-[a-z-]+\.ts$/.test(file));
  return Promise.all(
    files.sort().map(async (file) => (await import(path.join(scripts, file))).audit as Audit),
  );
}

export const audits: Stage = {
  name: 'audits',
  run: async () => {
    const tree = projectTree(root);
    return (await findAudits()).map((audit): Check => verdict(audit.name, audit.find(tree)));
  },
};
