import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import { useScheduleEdits } from '../hooks/use-schedule-edits.ts';
import { ScheduleUpload } from './schedule-upload.tsx';

interface UploadDialogProps {
  open: boolean;
  onClose: () => void;
  /** The panel one came from. */
  panelId: string | null;
  /** The panel that was written into, where it should be shown next. */
  onWritten?: (panelId: string) => void;
}

/** Upload of a schedule into the open job. A file that is open stays so when the dialog is closed and opened again. */
export function UploadDialog({ open, onClose, panelId, onWritten }: UploadDialogProps) {
  const { firm } = useOpenJob();
  const { rows } = useReplica();
  const edits = useScheduleEdits();
  return (
    <ScheduleUpload
      open={open}
      firm={firm}
      rows={rows}
      panelId={panelId}
      apply={(edit) => edits.apply(edit).problem}
      undo={() => edits.undo().problem}
      onClose={onClose}
      onWritten={onWritten}
    />
  );
}
