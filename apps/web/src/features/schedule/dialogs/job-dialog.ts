import type { Edit } from '@farlug/contract/edit';
import type { JobRows } from '@farlug/contract/rows';
import { ApiError } from '../../../lib/api-error.ts';
import type { ScheduleAsk } from './ask.ts';

/** What a dialog of the open job needs of it. */
export interface JobDialogProps {
  rows: JobRows;
  /** What was wrong; null where it was taken. */
  apply: (edit: Edit) => string | null;
  onClose: () => void;
  onAsk: (ask: ScheduleAsk) => void;
}

/** Sends a form's edit; what is refused stays on the form. */
export function taken(apply: JobDialogProps['apply'], edit: Edit | null): ApiError | null {
  const problem = edit ? apply(edit) : null;
  return problem === null ? null : new ApiError('invalid', problem);
}
