import { sql } from 'drizzle-orm';
import { type AnyPgColumn, type CheckBuilder, check } from 'drizzle-orm/pg-core';
import { z } from 'zod';

interface ValueRule {
  type?: string;
  enum?: readonly string[];
  pattern?: string;
  minLength?: number;
  maxLength?: number;
  minimum?: number;
  maximum?: number;
  minItems?: number;
  maxItems?: number;
  items?: ValueRule;
  anyOf?: readonly ValueRule[];
  allOf?: readonly ValueRule[];
}

const UUID_PATTERN = z.toJSONSchema(z.uuid()).pattern;
const quoted = (value: string) => `'${value.replaceAll("'", "''")}'`;
const list = (values: readonly string[]) => values.map(quoted).join(', ');

/**
 * The database's checks of a table, read off the zod schema of its rows: vocabulary, shape of decimals and
 * quantities, lengths, ranges. One definition, so that the database never refuses what the contract takes.
 */
export function checksOf(
  table: string,
  schema: z.ZodObject,
  columns: Record<string, AnyPgColumn>,
): CheckBuilder[] {
  const fields = (z.toJSONSchema(schema).properties ?? {}) as Record<string, ValueRule>;
  return Object.entries(fields).flatMap(([field, rule]) => {
    const column = columns[field];
    if (column === undefined) throw new Error(`${table} has no column for ${field}`);
    const conditions = conditionsOf(`"${column.name}"`, rule);
    return conditions.length === 0
      ? []
      : [check(`${table}_${column.name}_check`, sql.raw(conditions.join(' and ')))];
  });
}

/** A check that a text column holds one of a vocabulary, for columns that no row schema describes. */
export function oneOf(table: string, column: AnyPgColumn, values: readonly string[]): CheckBuilder {
  return check(`${table}_${column.name}_check`, sql.raw(`"${column.name}" in (${list(values)})`));
}

/** A column that is null satisfies every condition. */
function conditionsOf(column: string, rule: ValueRule): string[] {
  if (rule.anyOf) return rule.anyOf.flatMap((option) => conditionsOf(column, option));
  if (rule.enum) return [`${column} in (${list(rule.enum)})`];
  if (rule.type === 'array') return arrayConditions(column, rule);
  const patterns = [rule, ...(rule.allOf ?? [])].flatMap(({ pattern }) => pattern ?? []);
  if (patterns.includes(UUID_PATTERN ?? '')) return [];
  const conditions = patterns.map((pattern) => `${column} ~ ${quoted(pattern)}`);
  if (rule.minLength) conditions.push(`char_length(${column}) >= ${rule.minLength}`);
  if (rule.maxLength !== undefined) conditions.push(`char_length(${column}) <= ${rule.maxLength}`);
  if (rule.minimum !== undefined) conditions.push(`${column} >= ${rule.minimum}`);
  if (rule.maximum !== undefined) conditions.push(`${column} <= ${rule.maximum}`);
  return conditions;
}

function arrayConditions(column: string, rule: ValueRule): string[] {
  const conditions = [
    `cardinality(${column}) >= ${rule.minItems ?? 0}`,
    `cardinality(${column}) <= ${rule.maxItems}`,
  ];
  if (rule.items?.enum) conditions.push(`${column} <@ array[${list(rule.items.enum)}]::text[]`);
  return conditions;
}
