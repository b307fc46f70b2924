import { expect, it } from 'vitest';
import { treeOf } from './audit.ts';
import { audit } from './check-features.ts';

const call = "import { listJobs } from '@farlug/contract/routes';";
const sound = {
  'packages/contract/src/routes/index.ts': '',
  'packages/contract/src/routes/jobs.ts': '',
  'apps/api/src/features/jobs/jobs-routes.ts': '',
  'apps/web/src/features/jobs/api/use-jobs.ts': call,
  'apps/web/src/features/one-line/drawing.tsx': "import { rows } from '../../job/rows.ts';",
};

it('accepts one name everywhere, and views that call no route', () => {
  expect(audit.find(treeOf(sound))).toEqual([]);
});

it.each([
  ['a feature that the api lacks', 'packages/contract/src/routes/firm.ts', ''],
  ['a feature that the contract lacks', 'apps/api/src/features/firm/firm-routes.ts', ''],
  ['a feature of the web with another name', 'apps/web/src/features/projects/list.tsx', call],
])('finds %s', (_what, file, text) => {
  expect(audit.find(treeOf({ ...sound, [file]: text }))).toHaveLength(1);
});

it('finds that there is none', () => {
  expect(audit.find(treeOf({}))).toHaveLength(1);
});
