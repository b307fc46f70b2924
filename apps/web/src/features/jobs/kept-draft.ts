import { blankDraft, type JobDraft } from './job-draft.ts';

const keyOf = (firm: string) => `farlug.new-job.${firm}`;

/** What was typed into the form of a new job and not sent; a reload or a look at another page loses nothing. */
export function keptDraft(firm: string): JobDraft | null {
  try {
    const kept: unknown = JSON.parse(sessionStorage.getItem(keyOf(firm)) ?? 'null');
    return isDraft(kept) ? kept : null;
  } catch {
    return null;
  }
}

export function keepDraft(firm: string, draft: JobDraft | null): void {
  try {
    if (draft === null) sessionStorage.removeItem(keyOf(firm));
    else sessionStorage.setItem(keyOf(firm), JSON.stringify(draft));
  } catch {
    // A browser that stores nothing keeps the form while the page is open.
  }
}

/** Of this version of the form: every field there, and of its kind. */
function isDraft(kept: unknown): kept is JobDraft {
  if (typeof kept !== 'object' || kept === null) return false;
  const blank: object = blankDraft({ lengthUnit: 'ft', wireUnit: 'awg' });
  return Object.entries(blank).every(
    ([field, value]) => typeof value === typeof (kept as Record<string, unknown>)[field],
  );
}
