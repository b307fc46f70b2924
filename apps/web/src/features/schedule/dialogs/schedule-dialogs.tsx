import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import { useScheduleEdits } from '../hooks/use-schedule-edits.ts';
import type { ScheduleAsk } from './ask.ts';
import { FeederDialog } from './feeder-dialog.tsx';
import type { JobDialogProps } from './job-dialog.ts';
import { DeletePanelDialog, DuplicatePanelDialog } from './panel-actions.tsx';
import { PanelDialog } from './panel-dialog.tsx';
import { SourceDialog } from './source-dialog.tsx';
import { TransformerDialog } from './transformer-dialog.tsx';

interface ScheduleDialogsProps {
  /** Null: nothing is asked. */
  asked: ScheduleAsk | null;
  onAsk: (ask: ScheduleAsk | null) => void;
  /** The panel to show next; null after one was deleted. */
  onPanel: (panelId: string | null) => void;
}

/** The dialogs of the schedule, one at a time, upon the open job. */
export function ScheduleDialogs({ asked, onAsk, onPanel }: ScheduleDialogsProps) {
  const { archived } = useOpenJob();
  const { rows } = useReplica();
  const edits = useScheduleEdits();
  if (!asked || archived) return null;
  const onClose = () => onAsk(null);
  const apply: JobDialogProps['apply'] = (edit) => edits.apply(edit).problem;
  const shared = { rows, apply, onClose };
  const onDone = (panelId: string) => {
    onClose();
    onPanel(panelId);
  };
  switch (asked.kind) {
    case 'panel':
      return (
        <PanelDialog
          key={asked.id}
          {...shared}
          onAsk={onAsk}
          panelId={asked.id}
          feed={asked.feed ?? ''}
          onDone={onDone}
        />
      );
    case 'duplicate-panel':
      return <DuplicatePanelDialog {...shared} panelId={asked.id} onDone={onDone} />;
    case 'delete-panel':
      return (
        <DeletePanelDialog
          {...shared}
          panelId={asked.id}
          onDone={() => {
            onClose();
            onPanel(null);
          }}
        />
      );
    case 'transformer':
      return (
        <TransformerDialog key={asked.id} {...shared} transformerId={asked.id} feed={asked.feed ?? ''} />
      );
    case 'feeder':
      return <FeederDialog key={asked.id} {...shared} runId={asked.id} feed={asked.feed ?? ''} />;
    case 'source':
      return <SourceDialog {...shared} />;
  }
}
