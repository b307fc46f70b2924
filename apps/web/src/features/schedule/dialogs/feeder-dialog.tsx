import { deleteRunEdit, systemsOfRows, systemText } from '@farlug/contract/schedule';
import { useMemo } from 'react';
import { useForm } from '../../../lib/use-form.ts';
import { Field } from '../../../ui/field.tsx';

import { Select } from '../../../ui/select.tsx';
import { DeleteOrLeave } from './delete-or-leave.tsx';
import { DialogForm } from './dialog-form.tsx';
import { DialogPart, Further } from './dialog-part.tsx';
import { echoBreaker } from './echoes.ts';
import { type FeedValue, feedChoices } from './feed-choices.ts';
import { type FeederDraft, feederDraft, newFeederDraft, settleFeeder } from './feeder-draft.ts';
import { type JobDialogProps, taken } from './job-dialog.ts';
import { LongDialog } from './long-dialog.tsx';
import { furtherWrong, RunFields, RunFurtherFields } from './run-fields.tsx';
import { TypedInput } from './typed-input.tsx';

interface FeederDialogProps extends Omit<JobDialogProps, 'onAsk'> {
  /** Null adds one. */
  runId: string | null;
  feed: FeedValue;
}

/** Every field of a run: a feeder, a service run, a tie between two points. */
export function FeederDialog({ rows, apply, onClose, runId, feed }: FeederDialogProps) {
  const job = [...rows.job.values()][0]!;
  const run = rows.run.get(runId ?? '');
  const form = useForm<FeederDraft>({
    initial: run ? feederDraft(rows, run) : newFeederDraft(feed),
    check: (draft) => settleFeeder(rows, runId, draft).errors,
    submit: async (draft) => {
      const error = taken(apply, settleFeeder(rows, runId, draft).edit);
      if (!error) onClose();
      return error;
    },
  });
  const { values, set, errors } = form;
  const choices = useMemo(() => feedChoices(rows), [rows]);
  const metric = job.wireUnit === 'mm2';
  const circuit = run?.circuitId ? rows.circuit.get(run.circuitId) : undefined;
  const branch = circuit?.kind === 'branch';
  const hasBreaker = run ? circuit?.kind === 'feeder' : values.from.startsWith('panel:');
  const title = run ? `Run ${run.code}` : 'Add a run';
  const fields = {
    texts: values.run,
    errors,
    lengthUnit: job.lengthUnit,
    metric,
    onTexts: (texts: FeederDraft['run']) => set('run', texts),
  };
  return (
    <LongDialog
      changed={form.changed}
      onClose={onClose}
      title={title}
      description={
        run
          ? `From ${pointText(rows, run.fromBusId)} to ${pointText(rows, run.toBusId)}, on ${run.conductors.join(', ')}.`
          : 'Between two points that stand already: a second feeder, a tie, the closing of a ring. A panel brings its own feeder.'
      }
    >
      <DialogForm
        label={title}
        onSubmit={form.onSubmit}
        error={form.formError}
        busy={form.busy}
        action={run ? 'Save the run' : 'Add the run'}
        beside={
          <DeleteOrLeave
            what={run && !branch ? `run ${run.code}` : null}
            goes="Its breaker goes with it; what only it fed stays, without a feed."
            onLeave={onClose}
            onDelete={() => {
              const { edit, problem } = deleteRunEdit(rows, runId!);
              const wrong = problem ?? taken(apply, edit)?.message ?? null;
              if (wrong === null) onClose();
              return wrong;
            }}
          />
        }
      >
        {!run && (
          <DialogPart title="Where it goes">
            <TypedInput
              label="Name"
              hint="F7"
              required
              maxLength={60}
              value={values.code}
              error={errors.code}
              onText={(code) => set('code', code)}
            />
            <span className="max-desk:hidden" />
            <Field label="From" required error={errors.from}>
              <Select
                value={values.from}
                onValue={(from) => set('from', from)}
                choices={[{ value: '', label: 'Choose a panel or point' }, ...choices]}
              />
            </Field>
            <Field label="To" required error={errors.to}>
              <Select
                value={values.to}
                onValue={(to) => set('to', to)}
                choices={[{ value: '', label: 'Choose a panel or point' }, ...choices]}
              />
            </Field>
          </DialogPart>
        )}
        {hasBreaker && (
          <DialogPart title="Breaker of the panel that feeds it">
            <TypedInput
              label="Breaker"
              hint="200/3: amps and poles"
              echo={echoBreaker}
              value={values.breaker}
              error={errors.breaker}
              onText={(breaker) => set('breaker', breaker)}
            />
            <TypedInput
              label="Its spaces"
              hint="Empty: the first that are open."
              value={values.breakerSpaces}
              error={errors.breakerSpaces}
              onText={(breakerSpaces) => set('breakerSpaces', breakerSpaces)}
            />
          </DialogPart>
        )}
        <DialogPart title="Conductors">
          <RunFields {...fields} ownBreaker={run ? run.circuitId === null : !hasBreaker} />
        </DialogPart>
        <Further title="Insulation, ambient, protection, notes" wrong={furtherWrong(errors)}>
          <RunFurtherFields {...fields} />
        </Further>
      </DialogForm>
    </LongDialog>
  );
}

function pointText(rows: JobDialogProps['rows'], busId: string): string {
  const system = systemsOfRows(rows).get(busId);
  return `${rows.bus.get(busId)?.code ?? 'a point that is gone'}${system ? ` (${systemText(system)})` : ''}`;
}
