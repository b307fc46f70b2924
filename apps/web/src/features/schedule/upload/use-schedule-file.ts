import { IMPORT_BYTES_MAX, readSchedule } from '@farlug/contract/routes';
import { useRef, useState } from 'react';
import { call } from '../../../lib/call.ts';
import { formatBytes } from '../../../lib/format.ts';

export interface ScheduleFile {
  fileName: string;
  sheets: readonly { name: string; cells: readonly (readonly string[])[] }[];
}

interface Reading {
  /** The file that is being read. */
  busy: string | null;
  refused: string | null;
  read(file: File): Promise<ScheduleFile | null>;
  cancel(): void;
}

/** Has a file read into cells by the server, which stores nothing of it. */
export function useScheduleFile(firm: string): Reading {
  const [busy, setBusy] = useState<string | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  const running = useRef<AbortController | null>(null);

  const send = async (file: File, signal: AbortSignal): Promise<ScheduleFile | null> => {
    const body = new FormData();
    body.append('file', file);
    const outcome = await call(readSchedule, { params: { firm }, body, signal });
    if (outcome.ok) return outcome.data;
    const { message, details } = outcome.error;
    setRefused([`${file.name}: ${message}`, ...details.map((detail) => detail.message)].join(' '));
    return null;
  };

  return {
    busy,
    refused,
    async read(file) {
      running.current?.abort();
      setRefused(null);
      if (file.size > IMPORT_BYTES_MAX) {
        setRefused(
          `${file.name} has ${formatBytes(file.size)}; at most ${formatBytes(IMPORT_BYTES_MAX)} are read. Upload the schedule of a few panels at a time.`,
        );
        return null;
      }
      const abort = new AbortController();
      running.current = abort;
      setBusy(file.name);
      try {
        return await send(file, abort.signal);
      } catch (error) {
        if (abort.signal.aborted) return null;
        throw error;
      } finally {
        if (running.current === abort) {
          running.current = null;
          setBusy(null);
        }
      }
    },
    cancel() {
      running.current?.abort();
      running.current = null;
      setBusy(null);
    },
  };
}
