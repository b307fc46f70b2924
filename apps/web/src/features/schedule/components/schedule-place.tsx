import { downloadJobFile } from '@farlug/contract/routes';
import type { PanelView } from '@farlug/contract/schedule';
import { type ReactNode, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import { useResult, useScenario } from '../../../job/use-result.ts';
import { routeUrl } from '../../../lib/route-url.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Button } from '../../../ui/button.tsx';
import { EmptyState } from '../../../ui/empty-state.tsx';
import { Menu } from '../../../ui/menu.tsx';
import { Message } from '../../../ui/message.tsx';
import { RailTree } from '../../../ui/rail.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { Select } from '../../../ui/select.tsx';
import { type ShortcutGroup, useShortcuts } from '../../../ui/shortcuts.tsx';
import { InRail } from '../../../ui/slot.tsx';
import { DESK, useMedia } from '../../../ui/use-media.ts';
import { WorkArea } from '../../../ui/work-area.tsx';
import type { Trouble } from '../../../workers/results.ts';
import { cellContexts } from '../cell-contexts.ts';
import { FIELD_COLUMNS, RESULT_COLUMNS } from '../columns.ts';
import type { ScheduleAsk } from '../dialogs/ask.ts';
import { useReportVerdict } from '../hooks/use-report-verdict.ts';
import { useScheduleEdits } from '../hooks/use-schedule-edits.ts';
import { type JobSchedule, useScheduleView } from '../hooks/use-schedule-view.ts';
import { type ScheduleViewName, useSelection } from '../hooks/use-selection.ts';
import { missingIn, nextMissing } from '../next-missing.ts';
import { panelTreeItems } from '../panel-tree-items.ts';
import { UploadDialog } from '../upload/upload-dialog.tsx';
import { CircuitCards } from './circuit-cards.tsx';
import { CircuitSheet } from './circuit-sheet.tsx';
import { JobTrouble } from './job-trouble.tsx';
import { PanelFootRow } from './panel-foot.tsx';
import { PanelHead } from './panel-head.tsx';
import { ScheduleDialogs } from './schedule-dialogs.tsx';
import { ScheduleGrid } from './schedule-grid.tsx';
import { ScheduleLegend } from './schedule-legend.tsx';
import { WorstFirst } from './worst-first.tsx';

interface SchedulePlaceProps {
  /** What the side sheet shows of a circuit's run: its sizes and its hand check. */
  belowRun?: (runRowId: string) => ReactNode;
  cautions: ReactNode;
}

const VIEWS: readonly { value: ScheduleViewName; label: string }[] = [
  { value: 'results', label: 'Results' },
  { value: 'fields', label: 'All fields' },
  { value: 'loads', label: 'Loads, worst first' },
  { value: 'runs', label: 'Runs, worst first' },
];

const KEYS: ShortcutGroup = {
  title: 'Schedule',
  keys: [
    [['←', '↑', '→', '↓'], 'another cell'],
    [['Enter'], 'open the cell; take what was typed, go down'],
    [['F2'], 'open the cell'],
    [['Tab'], 'take what was typed, go right'],
    [['Esc'], 'leave the cell as it was'],
    [['Space'], 'show the circuit'],
    [['Ctrl', 'Home'], 'first cell'],
    [['Ctrl', 'End'], 'last cell'],
    [['Ctrl', 'D'], 'duplicate the circuit'],
    [['Shift', 'Delete'], 'delete the circuit'],
    [['Ctrl', 'Z'], 'undo'],
    [['Ctrl', 'Y'], 'redo'],
  ],
};

/** The panel schedules of a job with their verdicts: one panel at a time, or the whole job worst first. */
export function SchedulePlace({ belowRun, cautions }: SchedulePlaceProps) {
  const { firm, job, archived } = useOpenJob();
  const { rows } = useReplica();
  const snapshot = useResult();
  const [scenario] = useScenario();
  const schedule = useScheduleView();
  const edits = useScheduleEdits();
  const [selection, select] = useSelection();
  const [asked, setAsked] = useState<ScheduleAsk | null>(null);
  const [uploading, setUploading] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const desk = useMedia(DESK);
  useShortcuts(KEYS);
  useReportVerdict();
  const jobRow = [...rows.job.values()][0]!;
  usePageTitle(`Schedule, ${jobRow.name}`);

  const kept = scenario === 'each-circuit' ? null : scenario;
  const address = (change: { panel?: string; circuit?: string }) =>
    paths.schedule(firm, job, { ...change, scenario: kept });
  const circuit = selection.circuit ? schedule.circuit(selection.circuit) : null;
  const panel =
    schedule.panels.find((one) => one.id === selection.panel) ??
    (circuit ? schedule.panelOf(circuit.id) : null) ??
    schedule.panels[0] ??
    null;
  const tell = (done: { problem: string | null }) => setProblem(done.problem);
  const choose = (circuitId: string) => select({ circuit: circuitId });
  const missing = missingIn(schedule.panels);
  const next = nextMissing(schedule.panels, circuit?.id ?? null);
  const readOnly = archived;

  const added = (done: { id: string | null; problem: string | null }) => {
    tell(done);
    if (done.id) choose(done.id);
  };
  const remove = (circuitId: string) => {
    tell(edits.remove(circuitId));
    if (selection.circuit === circuitId) select({ circuit: null });
  };
  const showPanel = (panelId: string) => select({ panel: panelId, circuit: null });

  return (
    <>
      <InRail>
        <RailTree
          title="Panels"
          items={panelTreeItems(schedule.panels, snapshot.result, panel?.id ?? null, (id) =>
            address({ panel: id }),
          )}
        />
      </InRail>
      <WorkArea
        side={
          circuit && (
            <CircuitSheet
              key={circuit.id}
              rows={rows}
              circuit={circuit}
              result={snapshot.result}
              readOnly={readOnly}
              onClose={() => select({ circuit: null })}
              onType={(field, text) => edits.type(circuit.id, field, text).problem}
              onDuplicate={() => added(edits.duplicate(circuit.id))}
              onRemove={() => remove(circuit.id)}
              below={circuit.runs[0] && belowRun?.(circuit.runs[0].id)}
              cautions={cautions}
            />
          )
        }
      >
        <JobTrouble snapshot={snapshot} to={(at) => troubleAddress(schedule, rows, at, address)} />
        {problem && (
          <Message kind="wrong">
            {problem}{' '}
            <Button look="bare" onClick={() => setProblem(null)}>
              Close
            </Button>
          </Message>
        )}
        <div className="flex flex-none flex-wrap items-center gap-x-4 gap-y-2 border-b border-rule px-4 py-1.5">
          {!desk && panel && schedule.panels.length > 1 && (
            <Select
              aria-label="Panel"
              value={panel.id}
              onValue={showPanel}
              choices={schedule.panels.map((one) => ({ value: one.id, label: one.code }))}
            />
          )}
          {desk ? (
            <Segmented
              label="What is shown"
              value={selection.view}
              onValue={(view) => select({ view })}
              choices={VIEWS}
            />
          ) : (
            <Select
              aria-label="What is shown"
              value={selection.view}
              onValue={(view) => select({ view })}
              choices={VIEWS}
            />
          )}
          <HistoryButtons
            readOnly={readOnly}
            onUndo={() => tell(edits.undo())}
            onRedo={() => tell(edits.redo())}
          />
          <JobMenu
            panel={panel}
            readOnly={readOnly}
            onAsk={setAsked}
            fileUrl={routeUrl(downloadJobFile, { firm, job })}
          />
        </div>
        {!panel ? (
          <EmptyState
            title="No panel yet"
            actions={
              !readOnly && (
                <>
                  <Button look="go" big onClick={() => setAsked({ kind: 'panel', id: null })}>
                    Add a panel
                  </Button>
                  <Button big onClick={() => setUploading(true)}>
                    Upload a schedule
                  </Button>
                </>
              )
            }
          >
            A panel is fed from the service, from another panel or from a transformer. Its circuits follow,
            one row each.
          </EmptyState>
        ) : selection.view === 'loads' || selection.view === 'runs' ? (
          <WorstFirst
            what={selection.view}
            result={snapshot.result}
            schedule={schedule}
            to={(circuitId) => address({ circuit: circuitId })}
          />
        ) : (
          <>
            <PanelHead
              panel={panel}
              result={snapshot.result}
              feederLimit={feederLimit(rows)}
              actions={
                !readOnly && (
                  <>
                    <Button onClick={() => added(edits.add(panel.id))}>Add a circuit</Button>
                    <Button onClick={() => setUploading(true)}>Upload a schedule</Button>
                  </>
                )
              }
            />
            {desk ? (
              <ScheduleGrid
                key={`${panel.id} ${selection.view}`}
                label={`Circuits of ${panel.code}`}
                columns={selection.view === 'fields' ? FIELD_COLUMNS : RESULT_COLUMNS}
                rows={cellContexts(panel, snapshot.result)}
                chosenId={circuit?.id ?? null}
                readOnly={readOnly}
                onChoose={choose}
                onType={(id, field, text) => edits.type(id, field, text).problem}
                onDuplicate={(id) => added(edits.duplicate(id))}
                onRemove={remove}
                onUndo={() => tell(edits.undo())}
                onRedo={() => tell(edits.redo())}
              />
            ) : (
              <CircuitCards
                label={`Circuits of ${panel.code}`}
                rows={cellContexts(panel, snapshot.result)}
                onChoose={choose}
              />
            )}
            <PanelFootRow panel={panel} result={snapshot.result} />
          </>
        )}
        <ScheduleLegend
          result={snapshot.result}
          missing={missing}
          next={next}
          onNext={() => next && select({ panel: next.panelId, circuit: next.circuit.id })}
        />
        {!circuit && <div className="flex-none border-t border-rule px-4 py-1.5">{cautions}</div>}
      </WorkArea>
      <UploadDialog
        open={uploading}
        onClose={() => setUploading(false)}
        panelId={panel?.id ?? null}
        onWritten={showPanel}
      />
      <ScheduleDialogs
        rows={rows}
        ask={asked}
        onAsk={setAsked}
        onShow={showPanel}
        apply={(edit) => edits.apply(edit).problem}
      />
    </>
  );
}

function HistoryButtons({
  readOnly,
  onUndo,
  onRedo,
}: {
  readOnly: boolean;
  onUndo: () => void;
  onRedo: () => void;
}) {
  const { undo, redo } = useReplica();
  if (readOnly || (!undo && !redo)) return null;
  return (
    <span className="flex items-center gap-1">
      <Button look="bare" disabled={!undo} onClick={onUndo}>
        {undo ? `Undo: ${undo}` : 'Undo'}
      </Button>
      <Button look="bare" disabled={!redo} onClick={onRedo}>
        {redo ? `Redo: ${redo}` : 'Redo'}
      </Button>
    </span>
  );
}

interface JobMenuProps {
  panel: PanelView | null;
  readOnly: boolean;
  onAsk: (ask: ScheduleAsk) => void;
  fileUrl: string;
}

function JobMenu({ panel, readOnly, onAsk, fileUrl }: JobMenuProps) {
  const navigate = useNavigate();
  const download = { label: 'Download the job file', onSelect: () => window.location.assign(fileUrl) };
  const feed = panel ? (`panel:${panel.id}` as const) : '';
  const changes = [
    { label: 'Add a panel', onSelect: () => onAsk({ kind: 'panel', id: null, feed }) },
    { label: 'Add a transformer', onSelect: () => onAsk({ kind: 'transformer', id: null, feed }) },
    { label: 'Add a feeder', onSelect: () => onAsk({ kind: 'feeder', id: null, feed }) },
    { label: 'Add a source', onSelect: () => onAsk({ kind: 'source' }) },
  ];
  const ofPanel = panel
    ? [
        {
          label: `Change ${panel.code} and its feeder`,
          onSelect: () => onAsk({ kind: 'panel', id: panel.id }),
        },
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
  return (
    <span className="ml-auto flex items-center gap-2">
      {!readOnly && <Menu label="Panels and feeders" items={[...ofPanel, ...changes]} />}
      <Menu
        label="Job file"
        items={[
          download,
          { label: 'Job settings', onSelect: () => navigate('../settings', { relative: 'path' }) },
        ]}
      />
    </span>
  );
}

const feederLimit = (rows: ReturnType<typeof useReplica>['rows']): number | null => {
  const row = [...rows.limit.values()].find((limit) => limit.kind === 'feeder' && limit.class === null);
  return row ? Number(row.value) : null;
};

function troubleAddress(
  schedule: JobSchedule,
  rows: ReturnType<typeof useReplica>['rows'],
  at: NonNullable<Trouble['at']>,
  address: (change: { panel?: string; circuit?: string }) => string,
): string | null {
  if (at.table === 'circuit') return address({ circuit: at.row });
  if (at.table === 'panel') return address({ panel: at.row });
  if (at.table === 'bus') {
    const panel = schedule.panels.find((one) => one.bus.id === at.row);
    return panel ? address({ panel: panel.id }) : null;
  }
  if (at.table !== 'run' && at.table !== 'load') return null;
  const circuitId = rows[at.table].get(at.row)?.circuitId;
  return circuitId ? address({ circuit: circuitId }) : null;
}
