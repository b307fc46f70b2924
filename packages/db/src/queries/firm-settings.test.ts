import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { makeFirm, type TestFirm } from '../../test/factories.ts';
import type { FirmTransaction } from '../database.ts';
import { type TestDatabase, withTestDatabase } from '../testing/index.ts';
import {
  listConductors,
  listPresets,
  type Preset,
  readDefaults,
  removeConductor,
  removePreset,
  saveConductor,
  saveDefaults,
  savePreset,
} from './firm-settings.ts';

let database: TestDatabase;
let firm: TestFirm;
beforeAll(async () => {
  database = await withTestDatabase();
});
afterAll(() => database.close());
beforeEach(async () => {
  firm = await makeFirm(database.db);
});
const inFirm = <T>(run: (tx: FirmTransaction) => Promise<T>, of = firm) =>
  database.db.withFirm(of.firmId, of.personId, run);

const preset = (name: string): Preset => ({
  id: randomUUID(),
  name,
  clause: 'House rule 4',
  force: 'recommendation',
  includeService: false,
  includeTransformer: true,
  includeSource: false,
  longRun: false,
  limits: [
    { class: null, kind: 'total', atVolts: null, value: '5' },
    { class: 'sensitive', kind: 'branch', atVolts: null, value: '1.50' },
    { class: null, kind: 'lowest-volts', atVolts: '120', value: '110' },
  ],
});

test('a preset comes back as it was saved, and is written anew as a whole', async () => {
  const [first, second] = [preset('House'), preset('Bare')];
  await inFirm((tx) => savePreset(tx, first));
  await inFirm((tx) => savePreset(tx, { ...second, limits: [] }));
  expect(await inFirm((tx) => listPresets(tx))).toEqual([first, { ...second, limits: [] }]);
  const changed = { ...first, name: 'House, 2026', limits: first.limits.slice(1).reverse() };
  await inFirm((tx) => savePreset(tx, changed));
  expect(await inFirm((tx) => listPresets(tx))).toEqual([changed, { ...second, limits: [] }]);
  expect(await inFirm((tx) => removePreset(tx, first.id))).toBe(true);
  expect(await inFirm((tx) => removePreset(tx, first.id))).toBe(false);
  expect(await inFirm((tx) => listPresets(tx))).toHaveLength(1);
});

test('a firm cannot overwrite the preset of another, even under its id', async () => {
  const own = preset('House');
  await inFirm((tx) => savePreset(tx, own));
  const other = await makeFirm(database.db);
  await inFirm((tx) => savePreset(tx, { ...own, name: 'Theirs' }), other);
  expect(await inFirm((tx) => listPresets(tx))).toEqual([own]);
});

test('defaults are replaced as a whole', async () => {
  await inFirm((tx) => saveDefaults(tx, { powerFactor: '0.90', ambient: '40' }));
  await inFirm((tx) => saveDefaults(tx, { powerFactor: '0.85', terminals: '75' }));
  expect(await inFirm((tx) => readDefaults(tx))).toEqual({ powerFactor: '0.85', terminals: '75' });
  await inFirm((tx) => saveDefaults(tx, {}));
  expect(await inFirm((tx) => readDefaults(tx))).toEqual({});
});

test('a size of the firm’s own has a name of its own', async () => {
  const row = {
    id: randomUUID(),
    name: 'Finch 10',
    material: 'copper' as const,
    areaMm2: '10.0',
    r: '1.83',
    x: '0.10',
    per: 'km' as const,
    temperature: '20',
    ampacity: null,
    source: 'maker’s sheet of 2025',
  };
  expect(await inFirm((tx) => saveConductor(tx, row))).toBe('saved');
  expect(await inFirm((tx) => saveConductor(tx, { ...row, r: '1.84' }))).toBe('saved');
  expect(await inFirm((tx) => saveConductor(tx, { ...row, id: randomUUID() }))).toBe('name-taken');
  expect(await inFirm((tx) => listConductors(tx))).toEqual([{ ...row, r: '1.84' }]);
  expect(await inFirm((tx) => removeConductor(tx, row.id))).toBe(true);
  expect(await inFirm((tx) => removeConductor(tx, row.id))).toBe(false);
});
