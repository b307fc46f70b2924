import { command, type Stage, tool, verdict } from './stage.ts';

export const unused: Stage = {
  name: 'unused files, exports and packages',
  run: async () => {
    const { code, output } = await command(tool('knip'), ['--no-progress', '--reporter', 'compact']);
    return [verdict('knip', code === 0 ? [] : [output])];
  },
};
