import { randomUUID } from 'node:crypto';
import { listsFromRows } from '@farlug/contract/rows';
import { emptyRows } from '@farlug/contract/testing';
import type { Database } from '../src/database.ts';
import { addMember, createFirm } from '../src/queries/firms.ts';
import { createJob } from '../src/queries/jobs.ts';
import { createPerson } from '../src/queries/people.ts';

export interface TestFirm {
  firmId: string;
  personId: string;
}

/** A firm with one administrator. */
export async function makeFirm(db: Database, name = 'Alder & Finch Electric'): Promise<TestFirm> {
  const firmId = randomUUID();
  const personId = await makePerson(db);
  await db.withFirm(firmId, personId, async (tx) => {
    await createFirm(tx, { name });
    await addMember(tx, personId, 'admin');
  });
  return { firmId, personId };
}

export async function makePerson(db: Database, name = 'Ida Marlow'): Promise<string> {
  const id = randomUUID();
  await db.global((tx) =>
    createPerson(tx, { id, name, email: `${id}@alder.example`, passwordHash: 'not a hash' }),
  );
  return id;
}

/** An empty job of the firm. */
export async function makeJob(db: Database, { firmId, personId }: TestFirm): Promise<string> {
  const id = randomUUID();
  await db.withFirm(firmId, personId, (tx) => createJob(tx, listsFromRows(emptyRows(id))));
  return id;
}
