import { command, type Stage, tool, verdict } from './stage.ts';

export const format: Stage = {
  name: 'format and lint',
  run: async () => {
    const { code, output } = await command(tool('biome'), [
      'ci',
      '--colors=off',
      '--max-diagnostics=60',
      '.',
    ]);
    const checked = Number(/Checked (\d+) files?/.exec(output)?.[1] ?? 0);
    const problems = code === 0 ? [] : [output];
    if (checked === 0) problems.push(`biome checked no file:\n${output}`);
    return [verdict('biome', problems)];
  },
};
