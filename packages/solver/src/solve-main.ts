import { readFile } from 'node:fs/promises';
import { text } from 'node:stream/consumers';
import { runCommand } from './command.ts';

// A reader that has seen enough closes the pipe; that is no fault of the command.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error;
});

process.exitCode = await runCommand(process.argv.slice(2), {
  read: (file) => (file === '-' ? text(process.stdin) : readFile(file, 'utf8')),
  out: (document) => void process.stdout.write(document),
  err: (message) => void process.stderr.write(message),
});
