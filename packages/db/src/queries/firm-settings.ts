import type { Row } from '@farlug/contract/rows';
import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import type { FirmTransaction } from '../database.ts';
import { conductorRow, defaultValue, limitPreset, presetLimit } from '../schema/index.ts';

export type PresetLimit = Omit<Row<'limit'>, 'id'>;
export interface Preset {
  id: string;
  name: string;
  clause: string;
  force: 'recommendation' | 'mandatory';
  includeService: boolean;
  includeTransformer: boolean;
  includeSource: boolean;
  longRun: boolean;
  limits: PresetLimit[];
}

export async function listPresets(tx: FirmTransaction): Promise<Preset[]> {
  const presets = await tx.sql
    .select()
    .from(limitPreset)
    .where(eq(limitPreset.firmId, tx.firmId))
    .orderBy(asc(limitPreset.createdAt), asc(limitPreset.id));
  const limits = await tx.sql
    .select()
    .from(presetLimit)
    .where(eq(presetLimit.firmId, tx.firmId))
    .orderBy(asc(presetLimit.presetId), asc(presetLimit.position));
  return presets.map(({ firmId: _firm, createdAt: _at, ...preset }) => ({
    ...preset,
    limits: limits
      .filter((limit) => limit.presetId === preset.id)
      .map(({ kind, value, atVolts, ...limit }) => ({ class: limit.class, kind, atVolts, value })),
  }));
}

/** Writes the whole preset, new or known. */
export async function savePreset(tx: FirmTransaction, { limits, ...preset }: Preset): Promise<void> {
  const { id, ...values } = preset;
  await tx.sql
    .insert(limitPreset)
    .values({ firmId: tx.firmId, ...preset })
    .onConflictDoUpdate({ target: [limitPreset.firmId, limitPreset.id], set: values });
  await tx.sql
    .delete(presetLimit)
    .where(and(eq(presetLimit.firmId, tx.firmId), eq(presetLimit.presetId, id)));
  if (limits.length > 0)
    await tx.sql
      .insert(presetLimit)
      .values(limits.map((limit, position) => ({ firmId: tx.firmId, presetId: id, position, ...limit })));
}

export async function removePreset(tx: FirmTransaction, id: string): Promise<boolean> {
  const removed = await tx.sql
    .delete(limitPreset)
    .where(and(eq(limitPreset.firmId, tx.firmId), eq(limitPreset.id, id)))
    .returning({ id: limitPreset.id });
  return removed.length > 0;
}

export async function readDefaults(tx: FirmTransaction): Promise<Record<string, string>> {
  const rows = await tx.sql.select().from(defaultValue).where(eq(defaultValue.firmId, tx.firmId));
  return Object.fromEntries(rows.map(({ key, value }) => [key, value]));
}

/** The whole set: what is not named is no longer there. */
export async function saveDefaults(tx: FirmTransaction, values: Record<string, string>): Promise<void> {
  const keys = Object.keys(values);
  const known = await tx.sql
    .select({ key: defaultValue.key })
    .from(defaultValue)
    .where(eq(defaultValue.firmId, tx.firmId));
  const gone = known.map(({ key }) => key).filter((key) => !keys.includes(key));
  if (gone.length > 0)
    await tx.sql
      .delete(defaultValue)
      .where(and(eq(defaultValue.firmId, tx.firmId), inArray(defaultValue.key, gone)));
  if (keys.length > 0)
    await tx.sql
      .insert(defaultValue)
      .values(keys.map((key) => ({ firmId: tx.firmId, key, value: values[key]! })))
      .onConflictDoUpdate({
        target: [defaultValue.firmId, defaultValue.key],
        set: { value: sql`excluded.value` },
      });
}

export async function listConductors(tx: FirmTransaction): Promise<Row<'conductor'>[]> {
  const rows = await tx.sql
    .select()
    .from(conductorRow)
    .where(eq(conductorRow.firmId, tx.firmId))
    .orderBy(asc(conductorRow.name), asc(conductorRow.id));
  return rows.map(({ firmId: _firm, ...row }) => row);
}

/** `name-taken` where another size of the firm has the name. */
export async function saveConductor(
  tx: FirmTransaction,
  row: Row<'conductor'>,
): Promise<'saved' | 'name-taken'> {
  const [holder] = await tx.sql
    .select({ id: conductorRow.id })
    .from(conductorRow)
    .where(and(eq(conductorRow.firmId, tx.firmId), eq(conductorRow.name, row.name)));
  if (holder !== undefined && holder.id !== row.id) return 'name-taken';
  const { id: _, ...values } = row;
  await tx.sql
    .insert(conductorRow)
    .values({ firmId: tx.firmId, ...row })
    .onConflictDoUpdate({ target: [conductorRow.firmId, conductorRow.id], set: values });
  return 'saved';
}

export async function removeConductor(tx: FirmTransaction, id: string): Promise<boolean> {
  const removed = await tx.sql
    .delete(conductorRow)
    .where(and(eq(conductorRow.firmId, tx.firmId), eq(conductorRow.id, id)))
    .returning({ id: conductorRow.id });
  return removed.length > 0;
}
