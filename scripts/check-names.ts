import path from 'node:path';
import type { Audit } from './audit.ts';

const kebab = /^\.?[a-z0-9]+(?:-[a-z0-9]+)*(?:\.[a-z0-9]+(?:-[a-z0-9]+)*)*$/;
const byCustom = /^(?:README|DEVELOPERS|LICENSE|Dockerfile|OFL)(?:[.-].+)?$|^__root$|^_journal\.json$/;
const vague = /^(?:utils?|helpers?|misc|stuff)(?:\.[a-z]+)?$/;

function problem(part: string): string | undefined {
  if (byCustom.test(part)) return undefined;
  if (vague.test(part)) return `"${part}" says nothing: name it after what it holds`;
  return kebab.test(part) ? undefined : `"${part}" is not kebab-case`;
}

export const audit: Audit = {
  name: 'files and folders have kebab-case names that say something',
  find: (tree) =>
    tree.files
      .filter((file) => !/\/migrations\/|^fixtures\/uploads\//.test(file))
      .flatMap((file) => {
        const found = file
          .split(path.posix.sep)
          .map(problem)
          .find((text) => text !== undefined);
        return found ? [`${file}: ${found}`] : [];
      }),
};
