import { WIRE_UNITS, type WireUnit } from '@farlug/contract/rows';
import { BASES, type Basis, LENGTH_UNITS, type LengthUnit } from '@farlug/solver/job';
import { type ReactNode, useEffect } from 'react';
import type { ApiError } from '../../../lib/api-error.ts';
import { BASIS_WORDS } from '../../../lib/job-words.ts';
import { useForm } from '../../../lib/use-form.ts';
import { Button } from '../../../ui/button.tsx';
import { Field } from '../../../ui/field.tsx';
import { FormSection } from '../../../ui/form-section.tsx';
import { LeaveGuard } from '../../../ui/leave-guard.tsx';
import { Message } from '../../../ui/message.tsx';
import { Segmented } from '../../../ui/segmented.tsx';
import { draftErrors } from '../check-draft.ts';
import type { JobDraft } from '../job-draft.ts';
import type { Preset } from '../limits-of-preset.ts';
import { DraftText } from './draft-fields.tsx';
import { LimitsSection } from './limits-section.tsx';
import { SourceSection } from './source-section.tsx';

const LENGTH_WORDS: Record<LengthUnit, string> = { ft: 'Feet', m: 'Metres' };
const WIRE_WORDS: Record<WireUnit, string> = { awg: 'AWG and kcmil', mm2: 'mm²' };

interface JobFormProps {
  initial: JobDraft;
  presets: readonly Preset[];
  action: string;
  submit: (draft: JobDraft) => Promise<ApiError | null>;
  systemLocked?: boolean;
  readOnly?: boolean;
  beside?: ReactNode;
  done?: ReactNode;
  /** Takes every state of the form, to be kept until it is sent; without it, leaving asks first. */
  keep?: (draft: JobDraft) => void;
}

/** Everything that a job stands on: the same form for a new one and for its settings. */
export function JobForm({
  initial,
  presets,
  action,
  submit,
  systemLocked,
  readOnly,
  beside,
  done,
  keep,
}: JobFormProps) {
  const form = useForm({ initial, check: draftErrors, submit });
  useEffect(() => {
    if (form.changed) keep?.(form.values);
  }, [form.changed, form.values, keep]);
  const wrong = Object.keys(form.errors).filter((path) => path !== '').length;
  return (
    <form noValidate aria-label="Job" onSubmit={form.onSubmit}>
      <FormSection title="Job" note="As it stands in the title block of every page and report.">
        <DraftText form={form} field="name" label="Name" required className="desk:col-span-2" />
        <DraftText form={form} field="address" label="Address" className="desk:col-span-2" />
        <DraftText form={form} field="building" label="Building" />
        <DraftText form={form} field="area" label="Area" hint="As floors 2 and 3." />
        <DraftText
          form={form}
          field="codeEdition"
          label="Adopted code and edition"
          hint="As the authority says, as NEC 2023 with local amendments."
        />
        <DraftText form={form} field="authority" label="Authority having jurisdiction" />
        <DraftText form={form} field="permitNumber" label="Permit number" />
      </FormSection>
      {!keep && <LeaveGuard when={form.changed} />}
      {form.values.sources.map((source, index) => (
        <SourceSection key={source.id ?? source.code} form={form} index={index} systemLocked={systemLocked} />
      ))}
      <FormSection
        title="Basis and units"
        note="Typed units are understood anywhere, as 36 m in a job in feet."
      >
        <Field label="Basis" className="desk:col-span-2">
          <Segmented
            value={form.values.basis}
            onValue={(basis: Basis) => form.set('basis', basis)}
            choices={BASES.map((value) => ({ value, label: BASIS_WORDS[value] }))}
          />
        </Field>
        <Field label="Lengths">
          <Segmented
            value={form.values.lengthUnit}
            onValue={(unit: LengthUnit) => form.set('lengthUnit', unit)}
            choices={LENGTH_UNITS.map((value) => ({ value, label: LENGTH_WORDS[value] }))}
          />
        </Field>
        <Field label="Conductor sizes">
          <Segmented
            value={form.values.wireUnit}
            onValue={(unit: WireUnit) => form.set('wireUnit', unit)}
            choices={WIRE_UNITS.map((value) => ({ value, label: WIRE_WORDS[value] }))}
          />
        </Field>
      </FormSection>
      <LimitsSection form={form} presets={presets} />
      <div className="sticky bottom-0 flex flex-wrap items-center gap-4 border-t border-ink bg-paper px-4 py-3">
        <Button type="submit" look="go" big disabled={readOnly} aria-disabled={form.busy || undefined}>
          {form.busy ? 'One moment …' : action}
        </Button>
        {beside}
        {form.formError && <Message kind="wrong">{form.formError}</Message>}
        {wrong > 0 && (
          <p role="status" className="text-grid text-over">
            {wrong === 1 ? 'One field needs another look.' : `${wrong} fields need another look.`}
          </p>
        )}
        {!form.changed && done}
      </div>
    </form>
  );
}
