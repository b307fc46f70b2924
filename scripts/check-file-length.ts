import type { Audit } from './audit.ts';

const usual = 400;
const numerical = 500;

function limitFor(file: string): number {
  return file.startsWith('packages/solver/src/linear/') ? numerical : usual;
}

/** Printed tables are as long as their source, and migrations as their schema. */
function isMeasured(file: string): boolean {
  return /\.(ts|tsx|mjs|css|sh)$/.test(file) && !/\/tables\/data\/|\/migrations\//.test(file);
}

export const audit: Audit = {
  name: 'no file is longer than one thing can be',
  find: (tree) =>
    tree.files.filter(isMeasured).flatMap((file) => {
      const length = tree.read(file).trimEnd().split('\n').length;
      return length > limitFor(file) ? [`${file}: ${length} lines, at most ${limitFor(file)}: split it`] : [];
    }),
};
