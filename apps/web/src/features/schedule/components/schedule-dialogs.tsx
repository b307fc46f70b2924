import type { ScheduleAsk } from '../dialogs/ask.ts';
import type { JobDialogProps } from '../dialogs/job-dialog.ts';
import { PanelDialog } from '../dialogs/panel-dialog.tsx';

interface ScheduleDialogsProps extends Omit<JobDialogProps, 'onClose' | 'onAsk'> {
  ask: ScheduleAsk | null;
  onAsk: (ask: ScheduleAsk | null) => void;
  /** The panel to show next. */
  onShow: (panelId: string) => void;
}

/** The dialog for what the person asked to add, change or delete. */
export function ScheduleDialogs({ rows, apply, ask, onAsk, onShow }: ScheduleDialogsProps) {
  if (!ask) return null;
  const common = { rows, apply, onAsk, onClose: () => onAsk(null) };
  const done = (panelId: string) => {
    onAsk(null);
    onShow(panelId);
  };
  if (ask.kind === 'panel')
    return <PanelDialog {...common} panelId={ask.id} feed={ask.feed ?? ''} onDone={done} />;
  return null;
}
