import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';

/** SHA-256, in hex, of a value's canonical JSON (RFC 8785). */
export function canonicalHash(value: unknown): string {
  return createHash('sha256').update(canonicalJson(value)).digest('hex');
}

export function canonicalJson(value: unknown): string {
  const text = canonicalize(value);
  if (text === undefined) throw new Error('a value without a JSON form has no canonical one');
  return text;
}
