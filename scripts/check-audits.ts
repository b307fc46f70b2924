import type { Audit } from './audit.ts';

export const audit: Audit = {
  name: 'every audit is shown to fail on a bad sample',
  find: (tree) => {
    const audits = tree.files.filter(
      (file) => /^scripts\/check-[a-z-]+\.ts$/.test(file) && !file.endsWith('.test.ts'),
    );
    if (audits.length === 0) return ['scripts: there is no audit'];
    return audits
      .filter((file) => !tree.files.includes(file.replace(/\.ts$/, '.test.ts')))
      .map((file) => `${file}: it has no test beside it that proves that it can fail`);
  },
};
