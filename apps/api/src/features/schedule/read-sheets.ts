import { type ChildProcess, fork } from 'node:child_process';
import { readFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { type Refusal, refuse } from '../../platform/refusal.ts';
import type { SheetKind } from './sniff-file.ts';

export interface Sheet {
  name: string;
  cells: string[][];
}
interface ReadLimits {
  timeMs: number;
  heapMb: number;
  residentMb: number;
}
type Reply =
  | { ok: true; sheets: Sheet[] }
  | { ok: false; code: 'too_large' | 'unsupported_file' | 'invalid'; message: string };

const LIMITS: ReadLimits = { timeMs: 10_000, heapMb: 256, residentMb: 384 };
const AT_ONCE = 2;
const WATCH_MS = 100;
const child = fileURLToPath(new URL('./read-sheets-child.mjs', import.meta.url));
const TOO_MUCH =
  'This file takes too long or too much memory to read. Copy the schedule into a new workbook, or save it as CSV, and send that.';

let running = 0;
const waiting: (() => void)[] = [];

/** Reads a file into cells in a process that is ended when it takes too long or grows too large. */
export async function readSheets(
  kind: SheetKind,
  bytes: Buffer,
  limits: ReadLimits = LIMITS,
): Promise<Sheet[] | Refusal> {
  while (running >= AT_ONCE) await new Promise<void>((resolve) => waiting.push(resolve));
  running += 1;
  try {
    const reply = await readInChild(kind, bytes, limits);
    if (reply === null) return refuse('too_large', TOO_MUCH);
    return reply.ok ? reply.sheets : refuse(reply.code, reply.message);
  } finally {
    running -= 1;
    waiting.shift()?.();
  }
}

function readInChild(kind: SheetKind, bytes: Buffer, limits: ReadLimits): Promise<Reply | null> {
  return new Promise((resolve, reject) => {
    const reader = fork(child, [], {
      execArgv: [`--max-old-space-size=${limits.heapMb}`],
      serialization: 'advanced',
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
      env: { TZ: 'UTC' },
    });
    const timer = setTimeout(() => reader.kill('SIGKILL'), limits.timeMs);
    const watch = setInterval(() => void endIfLarge(reader, limits.residentMb), WATCH_MS);
    const settle = (reply: Reply | null) => {
      clearTimeout(timer);
      clearInterval(watch);
      resolve(reply);
    };
    reader.once('error', reject);
    reader.once('message', (reply) => settle(reply as Reply));
    reader.once('exit', () => settle(null));
    reader.send({ kind, bytes });
  });
}

async function endIfLarge(reader: ChildProcess, residentMb: number): Promise<void> {
  const statm = await readFile(`/proc/${reader.pid}/statm`, 'utf8').catch(() => '');
  const pages = Number(statm.split(' ')[1] ?? 0);
  if ((pages * 4096) / 1024 / 1024 > residentMb) reader.kill('SIGKILL');
}
