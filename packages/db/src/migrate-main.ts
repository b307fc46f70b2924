import { migrate } from './migrate.ts';

/**
 * Brings the database to the present schema and prints `{"apiUrl": …, "workerUrl": …}`.
 * Environment: FARLUG_OWNER_URL, FARLUG_API_PASSWORD, FARLUG_WORKER_PASSWORD.
 */
const { FARLUG_OWNER_URL, FARLUG_API_PASSWORD, FARLUG_WORKER_PASSWORD } = process.env;
if (!FARLUG_OWNER_URL || !FARLUG_API_PASSWORD || !FARLUG_WORKER_PASSWORD) {
  process.stderr.write(
    'Set FARLUG_OWNER_URL, FARLUG_API_PASSWORD and FARLUG_WORKER_PASSWORD: the address of the database as its owner, and the passwords that its two other roles get.\n',
  );
  process.exit(64);
}
const urls = await migrate({
  ownerUrl: FARLUG_OWNER_URL,
  apiPassword: FARLUG_API_PASSWORD,
  workerPassword: FARLUG_WORKER_PASSWORD,
});
process.stdout.write(`${JSON.stringify(urls)}\n`);
