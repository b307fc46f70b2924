import { type Audit, isTest, lines } from './audit.ts';

const idle: { pattern: RegExp; why: string }[] = [
  {
    pattern: /\b(?:it|test|describe|suite)(?:\.\w+)*\.(?:skip|only|todo|fails)\b/,
    why: 'no test is skipped, alone or still to come',
  },
  { pattern: /\b(?:x|f)(?:it|describe)\(/, why: 'no test is skipped or alone' },
  { pattern: /\b(?:skipIf|runIf)\(/, why: 'a test runs everywhere: bring what it needs' },
  { pattern: /expect\((?:true|false|1|0|'[^']*')\)\./, why: 'an expectation about a constant cannot fail' },
];

function assertsNothing(text: string): boolean {
  return !/\b(?:expect|assert|fc\.assert|expectTypeOf)\b/.test(text);
}

export const audit: Audit = {
  name: 'every test runs and can fail',
  find: (tree) =>
    tree.files
      .filter((file) => isTest(file) && /\.tsx?$/.test(file))
      .flatMap((file) => {
        const found = lines(tree, file).flatMap(({ at, text }) =>
          idle.filter(({ pattern }) => pattern.test(text)).map(({ why }) => `${at}: ${why}: ${text.trim()}`),
        );
        const empty = /\.test\.tsx?$/.test(file) && assertsNothing(tree.read(file));
        return empty ? [...found, `${file}: it expects nothing`] : found;
      }),
};
