import { randomUUID } from 'node:crypto';
import type { Row } from '@farlug/contract/rows';
import { emptyLists } from './lists.ts';
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

export function jobRowOf(id: string, name = 'Cooper Lane annex'): Row<'job'> {
  return {
    id,
    name,
    address: '4 Cooper Lane',
    building: null,
    area: null,
    codeEdition: null,
    authority: null,
    permitNumber: null,
    frequency: '60',
    basis: 'impedance',
    angle: 'nominal',
    lengthUnit: 'ft',
    wireUnit: 'awg',
    limitPreset: null,
    limitBasis: null,
    limitForce: 'recommendation',
    includeService: false,
    includeTransformer: false,
    includeSource: false,
    longRun: false,
  };
}

/** An empty job of the firm. */
export async function makeJob(db: Database, { firmId, personId }: TestFirm, name?: string): Promise<string> {
  const id = randomUUID();
  await db.withFirm(firmId, personId, (tx) =>
    createJob(tx, { ...emptyLists(), job: [jobRowOf(id, name)] }),
  );
  return id;
}
