import { downloadJobFile } from '@farlug/contract/routes';
import type { PanelView } from '@farlug/contract/schedule';
import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import { routeUrl } from '../../../lib/route-url.ts';
import { Menu, type MenuItem } from '../../../ui/menu.tsx';
import type { ScheduleAsk } from '../dialogs/ask.ts';

interface ScheduleMenuProps {
  panel: PanelView | null;
  readOnly: boolean;
  onAsk: (ask: ScheduleAsk) => void;
  onUpload: () => void;
  onUndo: () => void;
  onRedo: () => void;
}

/** Everything that is done to a panel and to the network, and the way back. */
export function ScheduleMenu({ panel, readOnly, onAsk, onUpload, onUndo, onRedo }: ScheduleMenuProps) {
  const { firm, job } = useOpenJob();
  const { rows, undo, redo } = useReplica();
  const feed = panel ? ({ feed: `panel:${panel.id}` } as const) : {};
  const ofPanel: MenuItem[] = panel
    ? [
        {
          label: `Change ${panel.code} and its feeder`,
          onSelect: () => onAsk({ kind: 'panel', id: panel.id }),
        },
        ...(panel.fedFrom?.transformerIds ?? []).map((id) => ({
          label: `Change transformer ${rows.transformer.get(id)?.code ?? ''}`,
          onSelect: () => onAsk({ kind: 'transformer', id }),
        })),
        {
          label: `Duplicate ${panel.code}`,
          onSelect: () => onAsk({ kind: 'duplicate-panel', id: panel.id }),
        },
        {
          label: `Delete ${panel.code}`,
          danger: true,
          onSelect: () => onAsk({ kind: 'delete-panel', id: panel.id }),
        },
      ]
    : [];
  const changes: MenuItem[] = [
    { label: undo ? `Undo: ${undo}` : 'Undo', disabled: !undo, keys: 'Ctrl Z', onSelect: onUndo },
    { label: redo ? `Redo: ${redo}` : 'Redo', disabled: !redo, keys: 'Ctrl Y', onSelect: onRedo },
    ...ofPanel,
    { label: 'Upload a schedule', onSelect: onUpload },
    { label: 'Add a panel', onSelect: () => onAsk({ kind: 'panel', id: null, ...feed }) },
    { label: 'Add a transformer', onSelect: () => onAsk({ kind: 'transformer', id: null, ...feed }) },
    { label: 'Add a feeder', onSelect: () => onAsk({ kind: 'feeder', id: null, ...feed }) },
    { label: 'Add a source', onSelect: () => onAsk({ kind: 'source' }) },
  ];
  const download: MenuItem = {
    label: 'Download the job file',
    onSelect: () => window.location.assign(routeUrl(downloadJobFile, { firm, job })),
  };
  return <Menu label="More" name="More about the panel" items={[...(readOnly ? [] : changes), download]} />;
}
