import { type Audit, lines } from './audit.ts';

// Each pattern is written so that it does not find itself.
const unwanted: { pattern: RegExp; why: string }[] = [
  {
    pattern: /lec[t]ure|trans[c]ript\b|home[w]ork|problem [s]et/i,
    why: 'this is a working tool, not a study aid',
  },
  { pattern: /(?<!\b(?:of|in the|in due) )\bcour[s]es?\b/i, why: 'this is a working tool, not a study aid' },
  { pattern: /(?<![\w.])\/(?:wor[k]|roo[t]|hom[e])\/\w/, why: 'a path of one machine' },
  {
    pattern: /registry\.[n]pm|deb\.[d]ebian|\/\/[\w.-]*[n]pmjs\.(?:org|com)/i,
    why: 'the host of a registry',
  },
  {
    pattern: /sub-?[a]gents?\b|\b(?:[i]ssue|[t]icket) #?\d/i,
    why: 'how the work was organised, not what it does',
  },
  {
    pattern: /(?:placeholder|dummy) [d]ata|[l]orem ipsum|coming [s]oon|not yet [i]mplemented/i,
    why: 'unfinished work',
  },
  {
    pattern: /\b(?:TO[D]O|FIX[M]E|HA[C]K)\b|\bXX[X]\b/,
    why: 'unfinished work: finish it, or say it in a decision',
  },
];

const read = /\.(ts|tsx|mjs|css|sh|sql|md|json|yml|yaml|html|svg|csv|toml)$|^\.ci\/|Dockerfile/;

export const audit: Audit = {
  name: 'no text speaks of anything but the product',
  find: (tree) =>
    tree.files
      .filter((file) => read.test(file) && !/migrations\/meta\//.test(file))
      .flatMap((file) => lines(tree, file))
      .flatMap(({ at, text }) =>
        unwanted
          .filter(({ pattern }) => pattern.test(text))
          .map(({ why }) => `${at}: ${why}: ${text.trim().slice(0, 100)}`),
      ),
};
