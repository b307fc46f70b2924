// `npm run db:generate -- --name add-a-verb-phrase`: writes the migration that brings the database to the schema.
import { spawnSync } from 'node:child_process';
import path from 'node:path';
import { root } from './gate/stage.ts';

const db = path.join(root, 'packages/db');
const done = spawnSync(
  path.join(db, 'node_modules/.bin/drizzle-kit'),
  ['generate', ...process.argv.slice(2)],
  {
    cwd: db,
    stdio: 'inherit',
  },
);
process.exitCode = done.status ?? 1;
