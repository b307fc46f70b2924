import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-document-paths.ts';

it('finds a path that is no more, and knows folders, names to choose and alternatives', () => {
  const found = audit.find(
    treeOf({
      'DEVELOPERS.md':
        '`scripts/run.mjs` `scripts/gone.ts` `apps/api/src/features/NAME/NAME-routes.ts` `packages/{solver,db}/src` `docs/decisions/` `npm test`',
      'scripts/run.mjs': '',
      'apps/api/src/features/jobs/jobs-routes.ts': '',
      'packages/db/src/a.ts': '',
      'docs/decisions/0001-a.md': '',
    }),
  );
  expect(found).toEqual(['DEVELOPERS.md: `scripts/gone.ts` does not exist']);
});
