import { applyEdit, type Edit, type EditConflict, invertEdit, newId } from '@farlug/contract/edit';
import type { JobRows } from '@farlug/contract/rows';
import { mineOver, theirsOver } from './resolve-conflict.ts';

/** What happened to an edit that was sent. */
export type Sent =
  | { kind: 'applied'; seq: number }
  | { kind: 'conflict'; conflicts: EditConflict[] }
  | { kind: 'refused'; message: string }
  | { kind: 'unreachable'; message: string };
export interface LaterEdits {
  headSeq: number;
  edits: { seq: number; edit: Edit; person: string }[];
}

/** What a replica needs of the world around it. */
export interface ReplicaPort {
  send(edit: Edit): Promise<Sent>;
  /** Throws where the server cannot be reached. */
  editsSince(seq: number): Promise<LaterEdits>;
  /** Keeps what has not been saved, for the next opening of the page. */
  keep(pending: readonly Edit[]): void;
  later(milliseconds: number, run: () => void): void;
}

export type Sync =
  | { kind: 'saved' }
  | { kind: 'saving'; waiting: number }
  | { kind: 'waiting'; waiting: number; message: string }
  | { kind: 'conflict'; edit: Edit; conflicts: readonly EditConflict[] }
  | { kind: 'refused'; edit: Edit; message: string };

export interface ReplicaSnapshot {
  rows: JobRows;
  /** The last edit of the server that these rows hold. */
  headSeq: number;
  /** True when every edit made here is saved: the job as seen is the job at `headSeq`. */
  settled: boolean;
  sync: Sync;
  undo: string | null;
  redo: string | null;
}

/** How the rows came to change: an edit upon the rows before, or anything else. */
export type RowsChange = { kind: 'edit'; edit: Edit } | { kind: 'rows'; rows: JobRows };

const RETRY_FIRST_MS = 2_000;
const RETRY_MOST_MS = 30_000;
const UNDO_MAX = 500;

/**
 * The open job in the browser: the rows that the server confirmed and the edits made upon them that it has not yet.
 * Edits are sent one at a time, in order. Only the server's answer makes a conflict; until then an edit that no
 * longer fits the confirmed rows is kept and left out of what is shown.
 */
export class Replica {
  private confirmed: JobRows;
  private headSeq: number;
  private pending: Edit[];
  private undoable: Edit[] = [];
  private redoable: Edit[] = [];
  private trouble: Extract<Sync, { kind: 'conflict' | 'refused' | 'waiting' }> | null = null;
  private sending = false;
  private failures = 0;
  private snapshot: ReplicaSnapshot;
  private readonly port: ReplicaPort;
  private readonly listeners = new Set<() => void>();
  private readonly changeListeners = new Set<(change: RowsChange) => void>();
  private readonly othersListeners = new Set<(person: string, label: string) => void>();

  constructor(rows: JobRows, headSeq: number, pending: readonly Edit[], port: ReplicaPort) {
    this.confirmed = rows;
    this.headSeq = headSeq;
    this.pending = [...pending];
    this.port = port;
    this.snapshot = this.take(this.shown());
    void this.pump();
  }

  getSnapshot = (): ReplicaSnapshot => this.snapshot;
  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };
  onChange(listener: (change: RowsChange) => void): () => void {
    this.changeListeners.add(listener);
    return () => this.changeListeners.delete(listener);
  }
  onOthers(listener: (person: string, label: string) => void): () => void {
    this.othersListeners.add(listener);
    return () => this.othersListeners.delete(listener);
  }

  /** Applies an edit made by the person; what it cannot take is said and nothing changes. */
  apply(edit: Edit): { ok: true } | { ok: false; message: string } {
    const done = this.perform(edit);
    if (done.ok) {
      this.undoable = [...this.undoable, edit].slice(-UNDO_MAX);
      this.redoable = [];
      this.publish();
    }
    return done;
  }

  undo(): { ok: true } | { ok: false; message: string } {
    const edit = this.undoable.at(-1);
    if (!edit) return { ok: false, message: 'There is nothing to undo.' };
    const done = this.perform(invertEdit(edit, `Undo: ${edit.label}`));
    if (done.ok) {
      this.undoable = this.undoable.slice(0, -1);
      this.redoable = [...this.redoable, edit];
      this.publish();
    }
    return done;
  }

  redo(): { ok: true } | { ok: false; message: string } {
    const edit = this.redoable.at(-1);
    if (!edit) return { ok: false, message: 'There is nothing to redo.' };
    const again = { ...edit, editId: newId(), label: `Redo: ${edit.label}`.slice(0, 200) };
    const done = this.perform(again);
    if (done.ok) {
      this.redoable = this.redoable.slice(0, -1);
      this.undoable = [...this.undoable, edit];
      this.publish();
    }
    return done;
  }

  /** Keeps this page's values over those that were saved meanwhile, or gives way to them. */
  resolve(choice: 'mine' | 'theirs'): void {
    const conflict = this.trouble;
    if (conflict?.kind !== 'conflict') return;
    const kept =
      choice === 'mine'
        ? mineOver(conflict.edit, conflict.conflicts)
        : theirsOver(conflict.edit, conflict.conflicts);
    this.pending = kept ? [kept, ...this.pending.slice(1)] : this.pending.slice(1);
    this.undoable = this.undoable.filter((edit) => edit.editId !== conflict.edit.editId);
    this.trouble = null;
    this.replaceRows();
    void this.pump();
  }

  /** Lets an edit go that the server will not take. */
  discard(): void {
    const refused = this.trouble;
    if (refused?.kind !== 'refused') return;
    this.pending = this.pending.slice(1);
    this.undoable = this.undoable.filter((edit) => edit.editId !== refused.edit.editId);
    this.trouble = null;
    this.replaceRows();
    void this.pump();
  }

  /** Asks for what others saved since; also tries again what waits. */
  async refresh(): Promise<void> {
    if (this.sending || this.trouble?.kind === 'conflict' || this.trouble?.kind === 'refused') return;
    if (this.pending.length > 0) return this.pump();
    await this.catchUp().catch(() => undefined);
  }

  private perform(edit: Edit): { ok: true } | { ok: false; message: string } {
    const outcome = applyEdit(this.snapshot.rows, edit);
    if (!outcome.ok)
      return {
        ok: false,
        message:
          'problems' in outcome
            ? outcome.problems.map((problem) => problem.message).join('; ')
            : `${edit.label}: the row was changed since.`,
      };
    this.pending = [...this.pending, edit];
    this.snapshot = this.take(outcome.rows);
    for (const listener of this.changeListeners) listener({ kind: 'edit', edit });
    void this.pump();
    return { ok: true };
  }

  private async pump(): Promise<void> {
    if (this.sending || this.pending.length === 0) return;
    if (this.trouble && this.trouble.kind !== 'waiting') return;
    this.sending = true;
    this.publish();
    const edit = this.pending[0]!;
    try {
      await this.settle(edit, await this.port.send(edit));
    } catch (error) {
      this.wait(error instanceof Error ? error.message : 'The server cannot be reached.');
    } finally {
      this.sending = false;
    }
    this.publish();
    if (this.pending.length > 0 && this.trouble === null) void this.pump();
  }

  private async settle(edit: Edit, sent: Sent): Promise<void> {
    if (sent.kind === 'unreachable') return this.wait(sent.message);
    this.failures = 0;
    this.trouble = null;
    if (sent.kind === 'refused') {
      this.trouble = { kind: 'refused', edit, message: sent.message };
      return;
    }
    if (sent.kind === 'conflict') {
      await this.catchUp();
      this.trouble = { kind: 'conflict', edit, conflicts: sent.conflicts };
      return;
    }
    if (sent.seq === this.headSeq + 1) {
      const outcome = applyEdit(this.confirmed, edit);
      if (outcome.ok) {
        this.confirmed = outcome.rows;
        this.headSeq = sent.seq;
        this.drop(edit.editId);
        return;
      }
    }
    await this.catchUp();
    this.drop(edit.editId);
    this.replaceRows();
  }

  private wait(message: string): void {
    this.failures += 1;
    this.trouble = { kind: 'waiting', waiting: this.pending.length, message };
    this.port.later(
      Math.min(RETRY_FIRST_MS * 2 ** (this.failures - 1), RETRY_MOST_MS),
      () => void this.pump(),
    );
  }

  /** Takes in what was saved since, in as many answers as it takes. */
  private async catchUp(): Promise<void> {
    const before = this.headSeq;
    for (;;) {
      const { headSeq, edits } = await this.port.editsSince(this.headSeq);
      const began = this.headSeq;
      for (const later of edits) this.takeIn(later);
      if (this.headSeq >= headSeq || this.headSeq === began) break;
    }
    if (this.headSeq !== before) this.replaceRows();
  }

  private takeIn({ seq, edit, person }: LaterEdits['edits'][number]): void {
    if (seq <= this.headSeq) return;
    const outcome = applyEdit(this.confirmed, edit);
    if (!outcome.ok)
      throw new Error('This page has lost track of the job: reload it. What is not saved is kept.');
    this.confirmed = outcome.rows;
    this.headSeq = seq;
    const own = this.pending.some((mine) => mine.editId === edit.editId);
    if (own) this.drop(edit.editId);
    else for (const listener of this.othersListeners) listener(person, edit.label);
  }

  private drop(editId: string): void {
    this.pending = this.pending.filter((edit) => edit.editId !== editId);
  }

  /** Confirmed rows with the pending edits that fit upon them. */
  private shown(): JobRows {
    let rows = this.confirmed;
    for (const edit of this.pending) {
      const outcome = applyEdit(rows, edit);
      if (outcome.ok) rows = outcome.rows;
    }
    return rows;
  }

  private replaceRows(): void {
    const rows = this.shown();
    this.snapshot = this.take(rows);
    for (const listener of this.changeListeners) listener({ kind: 'rows', rows });
    this.publish();
  }

  private publish(): void {
    this.snapshot = this.take(this.snapshot.rows);
    this.port.keep(this.pending);
    for (const listener of this.listeners) listener();
  }

  private take(rows: JobRows): ReplicaSnapshot {
    return {
      rows,
      headSeq: this.headSeq,
      settled: this.pending.length === 0,
      sync: this.sync(),
      undo: this.undoable.at(-1)?.label ?? null,
      redo: this.redoable.at(-1)?.label ?? null,
    };
  }

  private sync(): Sync {
    if (this.trouble?.kind === 'waiting') return { ...this.trouble, waiting: this.pending.length };
    if (this.trouble) return this.trouble;
    return this.pending.length === 0 ? { kind: 'saved' } : { kind: 'saving', waiting: this.pending.length };
  }
}
