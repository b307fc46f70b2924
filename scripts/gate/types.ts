import { existsSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { type Check, command, root, type Stage, tool, verdict } from './stage.ts';

export const types: Stage = {
  name: 'types',
  run: async () => {
    const checks: Check[] = [];
    for (const project of projects()) checks.push(await typeCheck(project));
    return checks;
  },
};

function projects(): string[] {
  const workspaces = ['packages', 'apps'].flatMap((folder) =>
    readdirSync(path.join(root, folder)).map((name) => path.join(folder, name)),
  );
  return ['.', ...workspaces].filter((project) => existsSync(path.join(root, project, 'tsconfig.json')));
}

async function typeCheck(project: string): Promise<Check> {
  const { code, output } = await command(tool('tsc'), ['-p', project, '--pretty', 'false']);
  return verdict(`tsc ${project}`, code === 0 ? [] : [output]);
}
