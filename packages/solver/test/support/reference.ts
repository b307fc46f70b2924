import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const FOLDER = fileURLToPath(new URL('../../../../fixtures/reference/', import.meta.url));

/** Reads one file of `fixtures/reference`: figures from outside, each with its source beside it. */
export const reference = <T>(name: string): T =>
  JSON.parse(readFileSync(`${FOLDER}${name}.json`, 'utf8')) as T;
