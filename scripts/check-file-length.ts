import type { Audit } from './audit.ts';

const usual = 400;
const long = 500;

/** Numerical kernels keep a whole method together, and a test its list of cases. */
function limitFor(file: string): number {
  const kept = file.startsWith('packages/solver/src/linear/') || /\.test\.tsx?$|\/(?:test|e2e)\//.test(file);
  return kept ? long : usual;
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
