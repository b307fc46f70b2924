import type { DecisionKind } from '@farlug/contract/routes';
import type { FieldErrors } from './form-errors.ts';

export interface DecisionDraft {
  decision: DecisionKind | null;
  words: string;
  comments: string;
  name: string;
  title: string;
}

/** What is missing from a decision before it can be put on record. */
export function checkDecision(draft: DecisionDraft): FieldErrors {
  const errors: Record<string, string> = {};
  if (draft.decision === null) errors.decision = 'Choose one.';
  if (draft.decision === 'other' && draft.words.trim() === '')
    errors.words = 'Write the decision in its own words.';
  if (draft.decision === 'corrections-needed' && draft.comments.trim() === '')
    errors.comments = 'Say what needs correction.';
  if (draft.name.trim() === '') errors.name = 'Enter a name.';
  return errors;
}
