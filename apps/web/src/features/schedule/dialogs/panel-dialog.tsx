import { PANEL_LAYOUTS, type PanelLayout } from '@farlug/solver/job';
import { useMemo } from 'react';
import { useForm } from '../../../lib/use-form.ts';
import { Button } from '../../../ui/button.tsx';
import { Checkbox } from '../../../ui/checkbox.tsx';
import { Field } from '../../../ui/field.tsx';

import { Message } from '../../../ui/message.tsx';
import { Select } from '../../../ui/select.tsx';
import { DialogForm } from './dialog-form.tsx';
import { DialogPart, Further } from './dialog-part.tsx';
import { echoAmps, echoBreaker } from './echoes.ts';
import { type FeedValue, feedChoices } from './feed-choices.ts';
import { type JobDialogProps, taken } from './job-dialog.ts';
import { LongDialog } from './long-dialog.tsx';
import { OnTheWay } from './on-the-way.tsx';
import { feederOf, newPanelDraft, type PanelDraft, panelDraft, settlePanel } from './panel-draft.ts';
import { furtherWrong, RunFields, RunFurtherFields } from './run-fields.tsx';
import { TypedInput } from './typed-input.tsx';

interface PanelDialogProps extends JobDialogProps {
  /** Null adds one. */
  panelId: string | null;
  feed: FeedValue;
  onDone: (panelId: string) => void;
}

const LAYOUT_WORDS: Record<PanelLayout, string> = {
  'two-column': 'Two columns, odd left and even right',
  sequential: 'One row, 1 2 3 …',
  'three-phase-ways': 'Three-phase ways',
};

/** A panel, what feeds it and its feeder, added or changed as one step. */
export function PanelDialog({ rows, apply, onClose, onAsk, panelId, feed, onDone }: PanelDialogProps) {
  const job = [...rows.job.values()][0]!;
  const panel = rows.panel.get(panelId ?? '');
  const form = useForm<PanelDraft>({
    initial: panel ? panelDraft(rows, panel) : newPanelDraft(rows, feed),
    check: (draft) => settlePanel(rows, panelId, draft).errors,
    submit: async (draft) => {
      const settled = settlePanel(rows, panelId, draft);
      const error = taken(apply, settled.edit);
      if (!error && settled.id) onDone(settled.id);
      return error;
    },
  });
  const { values, set, errors } = form;
  const choices = useMemo(() => feedChoices(rows, new Set(panel ? [panel.busId] : [])), [rows, panel]);
  const fromPanel = values.feed.startsWith('panel:');
  const feeder = panel ? feederOf(rows, panel.id) : null;
  const ownBreaker = feeder ? feeder.circuitId === null : !fromPanel;
  const metric = job.wireUnit === 'mm2';
  const text = (
    field: 'code' | 'name' | 'spaces' | 'lines' | 'mainAmps' | 'building' | 'area' | 'mounting' | 'notes',
    label: string,
    hint: string | null,
    more: Partial<Parameters<typeof TypedInput>[0]> = {},
  ) => (
    <TypedInput
      label={label}
      hint={hint}
      value={values[field]}
      error={errors[field]}
      onText={(typed) => set(field, typed)}
      {...more}
    />
  );
  const title = panel ? `Panel ${rows.bus.get(panel.busId)!.code}` : 'Add a panel';
  return (
    <LongDialog changed={form.changed} onClose={onClose} title={title}>
      <DialogForm
        label={title}
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action={panel ? 'Save the panel' : 'Add the panel'}
        beside={
          <Button big onClick={onClose}>
            Leave it
          </Button>
        }
      >
        <DialogPart title="Panel">
          {text('code', 'Name', 'Short, as on the door: LP-1.', { required: true, maxLength: 60 })}
          {text('name', 'What it serves', 'Loft studios, kitchen.')}
          {text('spaces', 'Spaces', null, { required: true, maxLength: 4 })}
          {text('mainAmps', 'Main breaker', '225 A; empty: lugs only', { echo: echoAmps })}
        </DialogPart>
        <DialogPart title="Fed from">
          <Field label="Panel or point" error={errors.feed} className="desk:col-span-2">
            <Select
              value={values.feed}
              onValue={(value) => set('feed', value)}
              choices={[
                {
                  value: '',
                  label: 'Nothing yet',
                  disabled: Boolean(panel) && panelDraft(rows, panel!).feed !== '',
                },
                ...choices,
              ]}
            />
          </Field>
          {fromPanel && !panel && (
            <Checkbox
              className="desk:col-span-2"
              checked={values.feedThrough}
              onChecked={(feedThrough) => set('feedThrough', feedThrough)}
              label="By its feed-through lugs, without a breaker there"
            />
          )}
          {fromPanel && !values.feedThrough && (
            <>
              <TypedInput
                label="Breaker there"
                hint="200/3: amps and poles"
                echo={echoBreaker}
                value={values.breaker}
                error={errors.breaker}
                onText={(typed) => set('breaker', typed)}
              />
              <TypedInput
                label="Its spaces"
                hint="Empty: the first that are open."
                value={values.breakerSpaces}
                error={errors.breakerSpaces}
                onText={(typed) => set('breakerSpaces', typed)}
              />
            </>
          )}
        </DialogPart>
        {values.feed === '' ? (
          <Message kind="note">Until something feeds it, its circuits are left out of the results.</Message>
        ) : (
          <>
            <DialogPart title="Feeder, the run that ends at the panel">
              <RunFields
                texts={values.run}
                errors={errors}
                lengthUnit={job.lengthUnit}
                metric={metric}
                ownBreaker={ownBreaker}
                onTexts={(run) => set('run', run)}
              />
            </DialogPart>
            {panel && <OnTheWay rows={rows} panelId={panel.id} onAsk={onAsk} />}
            <Further title="More of the feeder" wrong={furtherWrong(errors)}>
              <RunFurtherFields
                texts={values.run}
                errors={errors}
                lengthUnit={job.lengthUnit}
                metric={metric}
                onTexts={(run) => set('run', run)}
              />
            </Further>
          </>
        )}
        <Further title="More of the panel" wrong={Boolean(errors.lines || errors.notes)}>
          <Field label="Spaces are numbered" error={errors.layout}>
            <Select
              value={values.layout}
              onValue={(layout) => set('layout', layout)}
              choices={PANEL_LAYOUTS.map((value) => ({ value: value as string, label: LAYOUT_WORDS[value] }))}
            />
          </Field>
          {text(
            'lines',
            'Lines, from the first space',
            'L1, L2, L3: in the order in which the spaces take them',
          )}
          {text('building', 'Building', null)}
          {text('area', 'Area', null)}
          {text('mounting', 'Mounting', 'Surface, flush.')}
          {text('notes', 'Notes', null, { maxLength: 4000 })}
        </Further>
      </DialogForm>
    </LongDialog>
  );
}
