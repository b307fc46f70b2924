// Reads and checks one job file, and does nothing else: what `solve` is measured against.
import { readFile } from 'node:fs/promises';
import { parseJob } from '../src/job/index.ts';

const parsed = parseJob(JSON.parse(await readFile(process.argv[2]!, 'utf8')));
if (!parsed.ok) throw new Error(parsed.problems.map(({ path, message }) => `${path}: ${message}`).join('\n'));
process.stdout.write(`${parsed.job.loads.length} loads\n`);
