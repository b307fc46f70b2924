import { DEMO_ACCOUNTS, DEMO_FIRM } from '../../apps/api/src/demo/demo-accounts.ts';

/** What a person needs to begin: the address, whom to sign in as, where the mail goes. */
export function printWelcome(address: string, log: string): void {
  const roles = DEMO_ACCOUNTS.map(
    ({ role, email, password }) => `  ${role.padEnd(12)}${email.padEnd(36)}${password}`,
  );
  const mail = process.env.SMTP_URL
    ? 'Mail goes out through SMTP_URL.'
    : `No mail leaves this machine: read it at ${address}/mailbox`;
  process.stdout.write(`
Farlug is ready at ${address}

Sign in as one of ${DEMO_FIRM}, an invented firm with three jobs:
${roles.join('\n')}

${mail}
What the processes say is in ${log}. Ctrl-C stops everything.
`);
}
