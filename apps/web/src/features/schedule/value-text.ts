/** A field's value as it is shown where two of them are compared. */
export function valueText(value: unknown): string {
  if (value === null || value === undefined) return 'nothing';
  if (Array.isArray(value)) return value.map(valueText).join(', ');
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'object') {
    const row = value as { code?: unknown; name?: unknown; description?: unknown };
    return String(row.code ?? row.name ?? row.description ?? 'a row');
  }
  return String(value);
}
