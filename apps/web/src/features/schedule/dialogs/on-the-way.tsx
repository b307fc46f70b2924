import type { JobRows } from '@farlug/contract/rows';
import { panelTree } from '@farlug/contract/schedule';
import { Button } from '../../../ui/button.tsx';
import type { ScheduleAsk } from './ask.ts';

interface OnTheWayProps {
  rows: JobRows;
  panelId: string;
  onAsk: (ask: ScheduleAsk) => void;
}

/** What else stands between the feed and the panel: runs before a transformer, and the transformer. */
export function OnTheWay({ rows, panelId, onAsk }: OnTheWayProps) {
  const fed = panelTree(rows).find((node) => node.panel.id === panelId)?.fedFrom;
  const runs = (fed?.runIds ?? []).slice(0, -1).flatMap((id) => rows.run.get(id) ?? []);
  const transformers = (fed?.transformerIds ?? []).flatMap((id) => rows.transformer.get(id) ?? []);
  if (runs.length + transformers.length === 0) return null;
  return (
    <p className="flex flex-wrap items-center gap-x-3 text-grid text-ink-soft">
      On the way to it:
      {runs.map((run) => (
        <Button key={run.id} look="bare" onClick={() => onAsk({ kind: 'feeder', id: run.id })}>
          run {run.code}
        </Button>
      ))}
      {transformers.map((one) => (
        <Button key={one.id} look="bare" onClick={() => onAsk({ kind: 'transformer', id: one.id })}>
          transformer {one.code}
        </Button>
      ))}
    </p>
  );
}
