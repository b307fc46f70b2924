import type { JobRows } from '@farlug/contract/rows';
import type { PanelView } from '@farlug/contract/schedule';
import { type ReactNode, useMemo } from 'react';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { Select } from '../../../ui/select.tsx';
import { DESK, useMedia } from '../../../ui/use-media.ts';
import type { JobResult } from '../../../workers/results.ts';
import { cellContexts } from '../cell-contexts.ts';
import { FIELD_COLUMNS, RESULT_COLUMNS } from '../columns.ts';
import type { TypedCell } from '../grid-block.ts';
import { CircuitCards } from './circuit-cards.tsx';
import { PanelFootRow } from './panel-foot.tsx';
import { PanelHead } from './panel-head.tsx';
import { ScheduleGrid } from './schedule-grid.tsx';

/** A cell to go to; each has a number of its own, so that the same cell can be gone to again. */
export interface GridJump {
  no: number;
  circuitId: string;
  field: string | null;
}

interface PanelScheduleProps {
  rows: JobRows;
  panel: PanelView;
  panels: readonly PanelView[];
  result: JobResult | null;
  view: 'results' | 'fields';
  chosenId: string | null;
  readOnly: boolean;
  jump: GridJump | null;
  actions: ReactNode;
  to: (circuitId: string) => string;
  onPanel: (panelId: string) => void;
  onChoose: (circuitId: string) => void;
  onType: (cells: readonly TypedCell[]) => string | null;
  onAdd: () => void;
  onDuplicate: (circuitId: string) => void;
  onRemove: (circuitId: string) => void;
}

/** One panel: its head, its circuits as a grid or as cards, its foot. */
export function PanelSchedule(props: PanelScheduleProps) {
  const { rows, panel, panels, result, view, chosenId, readOnly, jump, actions, to, onPanel } = props;
  const desk = useMedia(DESK);
  const cells = useMemo(() => cellContexts(panel, result), [panel, result]);
  const label = `Circuits of ${panel.code}`;
  const here = jump && panel.circuits.some((circuit) => circuit.id === jump.circuitId) ? jump : null;
  return (
    <>
      <PanelHead
        rows={rows}
        panel={panel}
        result={result}
        to={to}
        chooser={
          !desk && panels.length > 1 ? (
            <Select
              bare
              aria-label="Panel"
              value={panel.id}
              onValue={onPanel}
              choices={panels.map((one) => ({ value: one.id, label: one.code }))}
            />
          ) : null
        }
        actions={actions}
      />
      {panel.circuits.length === 0 ? (
        <div className="min-h-0 flex-1 border-t border-ink bg-sheet">
          <EmptyState title={`${panel.code} has no circuit yet`}>
            Add one, or upload its schedule; lengths can follow later.
          </EmptyState>
        </div>
      ) : desk ? (
        <ScheduleGrid
          key={`${view} ${here?.no ?? 0}`}
          label={label}
          columns={view === 'fields' ? FIELD_COLUMNS : RESULT_COLUMNS}
          rows={cells}
          chosenId={chosenId}
          readOnly={readOnly}
          initial={here}
          onChoose={props.onChoose}
          onType={props.onType}
          onAdd={props.onAdd}
          onDuplicate={props.onDuplicate}
          onRemove={props.onRemove}
        />
      ) : (
        <CircuitCards label={label} rows={cells} onChoose={props.onChoose} />
      )}
      {desk && <PanelFootRow panel={panel} result={result} />}
    </>
  );
}
