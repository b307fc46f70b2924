import { type Edit, type EditConflict, edit as editSchema } from '@farlug/contract/edit';
import { conflictDetail, listEdits, postEdit } from '@farlug/contract/routes';
import type { ApiError } from '../lib/api-error.ts';
import { ask, call } from '../lib/call.ts';
import type { ReplicaPort, Sent } from './replica.ts';

const storageKey = (job: string) => `farlug.unsaved.${job}`;

/** The replica's way to the server and to the browser's own memory. */
export function jobPort(firm: string, job: string): ReplicaPort {
  const params = { firm, job };
  return {
    async send(edit) {
      const outcome = await call(postEdit, { params, body: edit });
      return outcome.ok ? { kind: 'applied', seq: outcome.data.seq } : refusal(outcome.error);
    },
    async editsSince(since) {
      const answer = await ask(listEdits, { params, query: { since } });
      return {
        headSeq: answer.headSeq,
        edits: answer.edits.map(({ seq, editId, label, ops, person }) => ({
          seq,
          edit: { editId, label, ops },
          person,
        })),
      };
    },
    keep(pending) {
      try {
        if (pending.length === 0) localStorage.removeItem(storageKey(job));
        else localStorage.setItem(storageKey(job), JSON.stringify(pending));
      } catch {
        // Storage that is full or forbidden: the edits stay in this page, whose closing asks first.
      }
    },
    later(milliseconds, run) {
      setTimeout(run, milliseconds);
    },
  };
}

/** What an earlier page of this job could not save. */
export function keptEdits(job: string): Edit[] {
  try {
    const stored: unknown = JSON.parse(localStorage.getItem(storageKey(job)) ?? '[]');
    const parsed = editSchema.array().safeParse(stored);
    return parsed.success ? parsed.data : [];
  } catch {
    return [];
  }
}

/** Signing out leaves nothing of the jobs in the browser. */
export function forgetKeptEdits(): void {
  const keys = Array.from({ length: localStorage.length }, (_, i) => localStorage.key(i));
  for (const key of keys) if (key?.startsWith(storageKey(''))) localStorage.removeItem(key);
}

const TRY_AGAIN = new Set(['unreachable', 'unreadable', 'unavailable', 'internal', 'too_many']);

function refusal(error: ApiError): Sent {
  if (TRY_AGAIN.has(error.code)) return { kind: 'unreachable', message: error.message };
  if (error.code === 'sign_in_needed')
    return {
      kind: 'unreachable',
      message: 'You were signed out: sign in again in another tab. Nothing is lost.',
    };
  const parsed = conflictDetail.array().safeParse(error.details);
  if (error.code === 'conflict' && parsed.success && parsed.data.length > 0) {
    const conflicts: EditConflict[] = parsed.data.map(
      ({ path: _path, message: _message, ...conflict }) => conflict,
    );
    return { kind: 'conflict', conflicts };
  }
  return {
    kind: 'refused',
    message: [error.message, ...error.details.map((detail) => detail.message)].join(' '),
  };
}
