import { randomUUID } from 'node:crypto';
import { addMember, createFirm, createJob, createPerson, personByEmail } from '@farlug/db';
import { hashPassword } from '../auth/passwords.ts';
import type { Deps } from '../deps.ts';
import { DEMO_ACCOUNTS, DEMO_FIRM } from './demo-accounts.ts';
import { demoJobs } from './demo-jobs.ts';

/** The demo firm with its people and jobs: made once, whole or not at all, and never touched again. */
export async function seedDemo(deps: Deps): Promise<'made' | 'there'> {
  const [first] = DEMO_ACCOUNTS;
  if (first && (await deps.db.global((tx) => personByEmail(tx, first.email)))) return 'there';
  const people = await Promise.all(
    DEMO_ACCOUNTS.map(async ({ password, ...account }) => ({
      ...account,
      id: randomUUID(),
      passwordHash: await hashPassword(password),
    })),
  );
  const owner = people.find(({ role }) => role === 'contractor')!;
  const firmId = randomUUID();
  await deps.db.withFirm(firmId, owner.id, async (tx) => {
    for (const { role: _role, ...person } of people) await createPerson(tx, person);
    await createFirm(tx, { name: DEMO_FIRM, reportHeading: 'Millrace Electric, 4 Sluice Lane' });
    for (const { id, role } of people) await addMember(tx, id, role);
    for (const rows of demoJobs(deps.config.fixturesDir)) await createJob(tx, rows);
  });
  deps.log.info({ firm: DEMO_FIRM, accounts: DEMO_ACCOUNTS.map(({ email }) => email) }, 'demo firm made');
  return 'made';
}
