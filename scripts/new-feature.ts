// `npm run new:feature -- NAME`: the same small feature in contract, db, api and web, and what remains to be said.
import { existsSync, mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { featureFiles } from './feature-files.ts';
import { root } from './gate/stage.ts';

const name = process.argv[2] ?? '';

function problem(files: Record<string, string>): string | undefined {
  if (!/^[a-z]+(?:-[a-z]+)*$/.test(name))
    return 'Give the feature a kebab-case name: npm run new:feature -- price-book';
  const taken = Object.keys(files).find((file) => existsSync(path.join(root, file)));
  return taken && `${taken} exists already: nothing was written.`;
}

const files = featureFiles(name);
const wrong = problem(files);
if (wrong) {
  process.stderr.write(`${wrong}\n`);
  process.exitCode = 64;
} else {
  for (const [file, text] of Object.entries(files)) {
    mkdirSync(path.dirname(path.join(root, file)), { recursive: true });
    writeFileSync(path.join(root, file), text);
    process.stdout.write(`${file}\n`);
  }
  process.stdout.write(`
Now say where it belongs; npm run check names what is forgotten:
  packages/contract/src/routes/index.ts   export the routes, and add them to ALL_ROUTES
  packages/db/src/schema/index.ts         export the table; packages/db/src/index.ts export its queries
  packages/db/src/tables.ts               list the table among the tenant tables
  npm run db:generate -- --name add_${name.replaceAll('-', '_')}
  npm run db:generate -- --custom --name isolate_${name.replaceAll('-', '_')}
                                          force row-level security and grant what the roles may do, as 0001 does
  apps/api/src/app.ts                     register the feature
  apps/web/src/routes/                    show it on a page
`);
}
