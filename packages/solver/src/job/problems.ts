import type { z } from 'zod';
import type { Problem } from './solution.ts';

/** What stands for the file as a whole. */
const ROOT_PATH = 'job';

/** `['runs', 3, 'length']` as `runs[3].length`. */
export const pathOf = (keys: readonly PropertyKey[]): string =>
  keys.reduce<string>(
    (path, key) =>
      typeof key === 'number' ? `${path}[${key}]` : path ? `${path}.${String(key)}` : String(key),
    '',
  );

const at = (input: unknown, keys: readonly PropertyKey[]): unknown =>
  keys.reduce<unknown>(
    (value, key) =>
      typeof value === 'object' && value !== null ? (value as Record<PropertyKey, unknown>)[key] : undefined,
    input,
  );

/** A value as a message shows it. */
export const shown = (value: unknown): string => {
  if (value === undefined) return 'is missing';
  if (typeof value === 'string') return `is "${value.length > 60 ? `${value.slice(0, 60)}…` : value}"`;
  if (value === null || typeof value === 'number' || typeof value === 'boolean') return `is ${String(value)}`;
  return Array.isArray(value) ? 'is a list' : 'is an object';
};

const NAMES: Record<string, string> = {
  string: 'a text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  array: 'a list',
  object: 'an object',
  record: 'an object',
};

type Issue = z.core.$ZodIssue;

const messageOf = (issue: Issue, value: unknown): string => {
  switch (issue.code) {
    case 'invalid_type':
      return `must be ${NAMES[issue.expected] ?? issue.expected}; ${shown(value)}`;
    case 'invalid_value':
      return `must be ${issue.values.length > 1 ? 'one of ' : ''}${issue.values.map(String).join(', ')}; ${shown(value)}`;
    case 'invalid_union':
      return unionMessage(issue, value);
    case 'invalid_format':
      return `must be a date and time such as 2026-11-03T09:20:00Z; ${shown(value)}`;
    case 'too_small':
    case 'too_big':
      return issue.message.startsWith('must') ? issue.message : boundMessage(issue);
    default:
      return issue.message;
  }
};

const boundMessage = (issue: Issue & { code: 'too_small' | 'too_big' }): string => {
  const bound = issue.code === 'too_small' ? issue.minimum : issue.maximum;
  const sign = issue.code === 'too_small' ? '≥' : '≤';
  return issue.origin === 'array' ? `must have ${sign} ${bound} entries` : `must be ${sign} ${bound}`;
};

const unionMessage = (issue: Issue & { code: 'invalid_union' }, value: unknown): string => {
  const told = issue.errors.flatMap((list) =>
    list.filter((i) => i.path.length === 0).map((i) => messageOf(i, value)),
  );
  const wanted = told.map((text) => text.replace(/^must be /, '').replace(/; is .*$/, ''));
  return `must be ${[...new Set(wanted)].join(' or ')}; ${shown(value)}`;
};

/** What a schema found, as paths and messages; an unknown key is a problem at that key. */
export function schemaProblems(
  issues: readonly Issue[],
  input: unknown,
  prefix: readonly PropertyKey[] = [],
): Problem[] {
  return issues.flatMap((issue) => {
    const keys = [...prefix, ...issue.path];
    if (issue.code === 'unrecognized_keys')
      return issue.keys.map((key) => ({
        path: pathOf([...keys, key]),
        message: 'is not a key of this format',
      }));
    return [{ path: pathOf(keys) || ROOT_PATH, message: messageOf(issue, at(input, issue.path)) }];
  });
}
