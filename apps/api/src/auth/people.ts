import { personByEmail, personById as storedPersonById } from '@farlug/db';
import type { Deps } from '../deps.ts';
import type { Person } from '../platform/caller.ts';
import { passwordHolds } from './passwords.ts';

export async function personByPassword(deps: Deps, email: string, password: string): Promise<Person | null> {
  const found = await deps.db.global((tx) => personByEmail(tx, email));
  const holds = await passwordHolds(found?.passwordHash ?? null, password);
  return found !== null && holds ? personOf(found) : null;
}

export async function personById(deps: Deps, id: string): Promise<Person | null> {
  const found = await deps.db.global((tx) => storedPersonById(tx, id));
  return found && personOf(found);
}

function personOf({ id, name, email }: Person): Person {
  return { id, name, email };
}
