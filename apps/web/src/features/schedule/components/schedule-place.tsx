import { type ReactNode, useCallback, useState } from 'react';
import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import { useResult } from '../../../job/use-result.ts';
import { usePageTitle } from '../../../lib/use-page-title.ts';
import { Button } from '../../../ui/button.tsx';
import { useShortcuts } from '../../../ui/shortcuts.tsx';
import { DESK, useMedia } from '../../../ui/use-media.ts';
import { WorkArea } from '../../../ui/work-area.tsx';
import type { ScheduleAsk } from '../dialogs/ask.ts';
import { ScheduleDialogs } from '../dialogs/schedule-dialogs.tsx';
import { useHistoryKeys } from '../hooks/use-history-keys.ts';
import { useReportVerdict } from '../hooks/use-report-verdict.ts';
import { useSaid } from '../hooks/use-said.ts';
import { useScheduleAddress } from '../hooks/use-schedule-address.ts';
import { useScheduleEdits } from '../hooks/use-schedule-edits.ts';
import { useScheduleView } from '../hooks/use-schedule-view.ts';
import { type MissingCircuit, missingCircuits } from '../next-missing.ts';
import { SCHEDULE_KEYS } from '../schedule-keys.ts';
import { troubleAddress } from '../trouble-address.ts';
import { UploadDialog } from '../upload/upload-dialog.tsx';
import { CircuitSheet } from './circuit-sheet.tsx';
import { JobTrouble } from './job-trouble.tsx';
import { LeftOutLink } from './left-out-link.tsx';
import { NextMissingLink } from './next-missing-link.tsx';
import { NoPanels } from './no-panels.tsx';
import { PanelRail } from './panel-rail.tsx';
import { type GridJump, PanelSchedule } from './panel-schedule.tsx';
import { ScheduleMenu } from './schedule-menu.tsx';
import { ScheduleNotes } from './schedule-notes.tsx';
import { ViewSwitch } from './view-switch.tsx';
import { WorstFirst } from './worst-first.tsx';

interface SchedulePlaceProps {
  cautions: ReactNode;
  /** What the side sheet shows of a run: its sizes side by side, and its hand check. */
  sizesFor?: (runRowId: string) => ReactNode;
  handCheckFor?: (runRowId: string) => ReactNode;
}

/** The panel schedules of a job with their verdicts: one panel at a time, or the whole job worst first. */
export function SchedulePlace({ cautions, sizesFor, handCheckFor }: SchedulePlaceProps) {
  const { archived } = useOpenJob();
  const { rows, undo, redo } = useReplica();
  const snapshot = useResult();
  const schedule = useScheduleView();
  const edits = useScheduleEdits();
  const address = useScheduleAddress(schedule);
  const { panelId, circuitId, view, to, go } = address;
  const [asked, setAsked] = useState<ScheduleAsk | null>(null);
  const [uploading, setUploading] = useState(false);
  const [jump, setJump] = useState<GridJump | null>(null);
  const desk = useMedia(DESK);
  const [said, say] = useSaid();
  useShortcuts(SCHEDULE_KEYS);
  useReportVerdict();
  usePageTitle('Schedule', [...rows.job.values()][0]?.name);

  const takeBack = useCallback(() => say(edits.undo(), undo && `Undone: ${undo}`), [edits, say, undo]);
  const doAgain = useCallback(() => say(edits.redo(), redo && `Done again: ${redo}`), [edits, say, redo]);
  useHistoryKeys(takeBack, doAgain);

  const { result } = snapshot;
  const panel = schedule.panels.find((one) => one.id === panelId) ?? null;
  const circuit = circuitId === null ? null : schedule.circuit(circuitId);
  const missing = missingCircuits(schedule.panels);
  const choose = (id: string) => go({ circuit: id });
  const jumpTo = (id: string, field: string | null) =>
    setJump((last) => ({ no: (last?.no ?? 0) + 1, circuitId: id, field }));
  const fillIn = ({ circuit: { id, next } }: MissingCircuit) => {
    jumpTo(id, next?.field ?? null);
    go({ circuit: id, ...(view === 'results' || view === 'fields' ? {} : { view: 'results' }) });
  };
  const add = () => {
    if (!panel) return;
    const done = edits.add(panel.id);
    say(done, null);
    if (!done.id) return;
    jumpTo(done.id, 'description');
    if (circuit || !desk) choose(done.id);
  };
  const duplicate = (id: string) => {
    const done = edits.duplicate(id);
    say(done, 'Duplicated.');
    if (!done.id) return;
    jumpTo(done.id, 'description');
    if (circuit) choose(done.id);
  };
  const remove = (id: string) => {
    const name = schedule.nameOf(id);
    say(edits.remove(id), `Deleted ${name}; undo brings it back.`);
    if (id === circuitId) go({ circuit: null });
  };

  const next = <NextMissingLink missing={missing} chosenId={circuitId} panelId={panelId} onJump={fillIn} />;
  const whole = view === 'loads' || view === 'runs';
  const actions = (
    <>
      <ViewSwitch view={view} onView={(chosen) => go({ view: chosen })} />
      {!archived && desk && !whole && <Button onClick={() => setUploading(true)}>Upload</Button>}
      {!archived && panel && !whole && <Button onClick={add}>Add circuit</Button>}
      <ScheduleMenu
        panel={panel}
        readOnly={archived}
        onAsk={setAsked}
        onUpload={() => setUploading(true)}
        onUndo={takeBack}
        onRedo={doAgain}
      />
    </>
  );

  return (
    <>
      <PanelRail
        schedule={schedule}
        result={result}
        current={panelId}
        to={(id) => to({ panel: id, view: view === 'fields' ? 'fields' : 'results' })}
      />
      <WorkArea
        side={
          circuit && (
            <CircuitSheet
              key={circuit.id}
              rows={rows}
              circuit={circuit}
              result={result}
              readOnly={archived}
              onClose={() => go({ circuit: null })}
              onType={(field, text) => edits.type(circuit.id, field, text).problem}
              onApply={(change) => edits.apply(change.edit, change.problem).problem}
              onDuplicate={() => duplicate(circuit.id)}
              onRemove={() => remove(circuit.id)}
              next={next}
              sizesFor={sizesFor}
              handCheckFor={handCheckFor}
              cautions={cautions}
            />
          )
        }
      >
        <div className={desk ? 'contents' : 'min-h-0 flex-1 overflow-auto'}>
          <JobTrouble snapshot={snapshot} to={(at) => troubleAddress(rows, at, to)} />
          {whole ? (
            <WorstFirst
              what={view}
              result={result}
              schedule={schedule}
              actions={actions}
              onWhat={(what) => go({ view: what })}
              to={(id) => to({ circuit: id, view: 'results' })}
            />
          ) : panel ? (
            <PanelSchedule
              key={panel.id}
              rows={rows}
              panel={panel}
              panels={schedule.panels}
              result={result}
              view={view}
              chosenId={circuitId}
              readOnly={archived}
              jump={jump}
              actions={actions}
              to={(id) => to({ circuit: id })}
              onPanel={(id) => go({ panel: id })}
              onChoose={choose}
              onType={(cells) => edits.typeCells(cells).problem}
              onAdd={add}
              onDuplicate={duplicate}
              onRemove={remove}
            />
          ) : (
            <NoPanels
              readOnly={archived}
              onPanel={() => setAsked({ kind: 'panel', id: null })}
              onUpload={() => setUploading(true)}
            />
          )}
          <ScheduleNotes
            panel={whole ? null : panel}
            result={result}
            said={said}
            leftOut={
              result && (
                <LeftOutLink
                  leftOut={result.leftOut}
                  count={result.leftOutCount}
                  nameOf={schedule.nameOf}
                  to={(place) => to({ ...place, view: 'results' })}
                />
              )
            }
            next={next}
          />
          {!(circuit && desk) && <div className="flex-none border-t border-rule px-4 py-1.5">{cautions}</div>}
        </div>
      </WorkArea>
      <UploadDialog
        open={uploading}
        onClose={() => setUploading(false)}
        panelId={panelId}
        onWritten={(id) => go({ panel: id, view: 'results' })}
      />
      <ScheduleDialogs asked={asked} onAsk={setAsked} onPanel={(id) => go({ panel: id })} />
    </>
  );
}
