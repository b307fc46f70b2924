// Which file may import which. Each rule says why it stands; `npm test` fails when one is broken or sees no module.

/**
 * @param {string} name
 * @param {string} comment
 * @param {object} from
 * @param {object} to
 */
const forbid = (name, comment, from, to) => ({
  name,
  comment,
  severity: /** @type {const} */ ('error'),
  from,
  to,
});

const test = '\\.test\\.tsx?$|/testing/|/test/|/e2e/|/bench/|vitest\\.config|drizzle\\.config';
/** @param {string[]} names packages of npm, wherever pnpm keeps them */
const npm = (...names) => `node_modules/(?:${names.join('|')})/`;

const packages = [
  forbid(
    'solver-stands-alone',
    'The solver runs unchanged in Node, a browser and a worker, and can be read without the rest.',
    { path: '^packages/solver/' },
    { path: '^(packages/(contract|db)|apps)/' },
  ),
  forbid(
    'solver-does-no-input-or-output',
    'A solver that reads files or sockets cannot run in a browser; only its command line does.',
    { path: '^packages/solver/src/', pathNot: `${test}|^packages/solver/src/(solve-main|command)` },
    { dependencyTypes: ['core'] },
  ),
  forbid(
    'contract-knows-the-job-only',
    'The contract is loaded by the first page: it may know the job, its units and its tables, never how it is solved.',
    { path: '^packages/contract/src/', pathNot: test },
    { path: '^packages/solver/src/', pathNot: '^packages/solver/src/((job|units|tables)/|version\\.ts$)' },
  ),
  forbid(
    'contract-below-db-and-apps',
    'Server and browser share the contract; it can depend on neither.',
    { path: '^packages/contract/' },
    { path: '^(packages/db|apps)/' },
  ),
  forbid(
    'db-below-apps',
    'The database layer serves the api and must not know it.',
    { path: '^packages/db/' },
    { path: '^apps/' },
  ),
  forbid(
    'api-without-web',
    'The api serves built files; it never imports the source of a page.',
    { path: '^apps/api/' },
    { path: '^apps/web/' },
  ),
  forbid(
    'web-without-server',
    'Code of the server or the database must never reach a browser.',
    { path: '^apps/web/src/' },
    { path: '^(apps/api|packages/db)/' },
  ),
  forbid(
    'packages-only-by-their-exports',
    'What a package does not export is its own business; tests stand beside the source and use the same door.',
    { path: '^(packages|apps)/([^/]+)/' },
    { path: '^packages/([^/]+)/(test|bench)/', pathNot: '^packages/$2/' },
  ),
];

const libraries = [
  forbid(
    'sql-only-in-db',
    'One package knows how rows are stored, so isolation between firms has one place to be checked.',
    { path: '^(packages|apps)/', pathNot: '^packages/db/' },
    { path: npm('drizzle-orm', 'drizzle-kit', 'pg', 'pg-boss', 'postgres') },
  ),
  forbid(
    'mathjs-only-where-numbers-are',
    'mathjs is large: it stays inside the solver, behind its own subpaths.',
    {
      path: '^(packages|apps)/',
      pathNot: `^packages/solver/src/(units|linear|equations|network|judge)/|${test}`,
    },
    { path: npm('mathjs') },
  ),
  forbid(
    'react-only-in-pages-and-pdf',
    'React draws pages and the PDF; anything else would tie rules to a screen.',
    { path: '^(packages|apps)/', pathNot: '^apps/(web/|api/src/.*pdf)' },
    { path: npm('react', 'react-dom', '@react-pdf/renderer') },
  ),
  forbid(
    'express-only-in-routes',
    'A service that knows requests cannot be called by the worker.',
    {
      path: '^(packages|apps)/',
      pathNot: '^apps/api/src/(main|app|http/|auth/|platform/|.*-routes\\.ts$|.*mailbox)',
    },
    { path: npm('express', 'multer', 'helmet', 'express-rate-limit', 'express-session') },
  ),
  forbid(
    'passport-only-in-auth',
    'How a person signs in is one adapter, so that another way can stand beside it.',
    { path: '^(packages|apps)/', pathNot: '^apps/api/src/auth/' },
    { path: npm('passport', 'passport-local', '@node-rs/argon2') },
  ),
  forbid(
    'mail-only-in-its-adapter',
    'Mail leaves through the queue and one adapter: nothing else may send.',
    { path: '^(packages|apps)/', pathNot: `^apps/api/src/.*(mail|smtp)|${test}` },
    { path: npm('nodemailer', 'smtp-server', 'mailparser') },
  ),
];

const api = [
  forbid(
    'routes-call-services',
    'A route translates HTTP; what may be done and how is the service’s.',
    { path: '^apps/api/src/features/.+-routes\\.ts$' },
    {
      path: [
        '^packages/db/',
        '^packages/solver/src/(network|linear|equations|judge|sizing)/',
        '-policy\\.ts$',
      ],
    },
  ),
  forbid(
    'services-below-routes',
    'A service also runs in the worker, where there are no routes.',
    { path: '^apps/api/src/features/.+-(service|policy|presenter)\\.ts$' },
    { path: '^apps/api/src/(features/.+-routes\\.ts$|http/|app\\.ts|main\\.ts)' },
  ),
  forbid(
    'policy-decides-only',
    'Who may do what is a pure function of role and row, tested by itself.',
    { path: '^apps/api/src/features/.+-policy\\.ts$' },
    { path: ['^packages/db/', '-(service|routes|presenter)\\.ts$'] },
  ),
  forbid(
    'features-of-the-api-meet-in-services',
    'A feature may call another’s service; its routes, policy and presenter are its own.',
    { path: '^apps/api/src/features/([^/]+)/', pathNot: test },
    {
      path: '^apps/api/src/features/[^/]+/.+-(routes|policy|presenter)\\.ts$',
      pathNot: '^apps/api/src/features/$1/',
    },
  ),
];

const web = [
  forbid(
    'a-feature-never-imports-another',
    'Features are put together in routes, so that each can be read, changed and removed alone.',
    { path: '^apps/web/src/features/([^/]+)/' },
    { path: '^apps/web/src/features/', pathNot: '^apps/web/src/features/$1/' },
  ),
  forbid(
    'ui-and-lib-know-nothing',
    'Parts of the look are used by everything and must know nothing of it.',
    { path: '^apps/web/src/(ui|lib)/' },
    { path: '^apps/web/src/(job|features|routes|app|workers)/' },
  ),
  forbid(
    'job-below-features',
    'The open job is one replica under all features.',
    { path: '^apps/web/src/job/' },
    { path: '^apps/web/src/(features|routes|app)/' },
  ),
  forbid(
    'features-below-routes',
    'A feature does not know where it is shown; only the paths of the application, as values.',
    { path: '^apps/web/src/features/' },
    { path: '^apps/web/src/(routes|app)/', pathNot: '^apps/web/src/app/paths\\.ts$' },
  ),
  forbid(
    'routes-below-the-app',
    'The router knows the routes, not the other way round.',
    { path: '^apps/web/src/routes/' },
    { path: '^apps/web/src/app/', pathNot: '^apps/web/src/app/paths\\.ts$' },
  ),
];

const everywhere = [
  forbid(
    'no-circle',
    'Files that import each other can only be understood, tested and loaded together.',
    { path: '^(packages|apps|scripts)/' },
    { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } },
  ),
  forbid('resolvable', 'An import that leads nowhere fails at run time.', {}, { couldNotResolve: true }),
  forbid(
    'tests-are-leaves',
    'What a test needs is not part of the product.',
    { path: '^(packages|apps)/', pathNot: test },
    {
      path: `\\.test\\.tsx?$|^packages/db/src/testing/|${npm('vitest', 'fast-check', 'supertest', 'playwright-core', 'happy-dom')}`,
    },
  ),
  forbid(
    'declared-where-used',
    'A package that another brings along by chance can vanish with its next version.',
    { path: '^(packages|apps)/', pathNot: test },
    { dependencyTypes: ['npm-no-pkg', 'npm-unknown'] },
  ),
];

/** What must not be loaded with an entry, however many files lie between; imports made on demand do not count. */
export const unreachable = [
  {
    name: 'contract-never-loads-mathjs',
    comment: 'Whoever reads a route would otherwise load a mathematics library.',
    from: '^packages/contract/src/',
    to: npm('mathjs'),
  },
  {
    name: 'first-page-never-loads-mathjs',
    comment: 'The first page must open quickly on a phone in a basement.',
    from: '^apps/web/src/main\\.tsx$',
    to: npm('mathjs'),
  },
];

/** @type {import('dependency-cruiser').IConfiguration} */
export default {
  forbidden: [...packages, ...libraries, ...api, ...web, ...everywhere],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '(^|/)dist/' },
    tsPreCompilationDeps: true,
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'types', 'node', 'default'],
      extensions: ['.ts', '.tsx', '.mjs', '.js', '.json', '.d.ts'],
    },
  },
};
