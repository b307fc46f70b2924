import type { ComponentProps, ReactNode } from 'react';
import type { FieldErrors } from '../../../lib/form-errors.ts';
import type { Form } from '../../../lib/use-form.ts';
import { Field } from '../../../ui/field.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import type { JobDraft, LimitsDraft } from '../job-draft.ts';

/** A form that holds at least these fields. */
export type FormOf<V extends object> = Pick<Form<V>, 'values' | 'set' | 'errors'>;
export type DraftForm = FormOf<JobDraft>;
export type LimitsForm = FormOf<LimitsDraft>;

interface DraftTextProps<K extends string> {
  form: { values: Record<K, string>; set: (field: K, value: string) => void; errors: FieldErrors };
  field: K;
  label: string;
  hint?: ReactNode;
  required?: boolean;
  className?: string;
  input?: ComponentProps<'input'>;
}

export function DraftText<K extends string>({
  form,
  field,
  label,
  hint,
  required,
  className,
  input,
}: DraftTextProps<K>) {
  return (
    <Field label={label} hint={hint} required={required} error={form.errors[field]} className={className}>
      <TextInput
        maxLength={400}
        value={form.values[field]}
        onChange={(event) => form.set(field, event.target.value)}
        {...input}
      />
    </Field>
  );
}

/** A number with its unit said at the label. */
export function NumberField({
  label,
  hint,
  error,
  value,
  onText,
  required,
  disabled,
}: {
  label: string;
  hint?: ReactNode;
  error?: string | undefined;
  value: string;
  onText: (text: string) => void;
  required?: boolean;
  disabled?: boolean;
}) {
  return (
    <Field label={label} hint={hint} error={error} required={required}>
      <TextInput
        inputMode="decimal"
        maxLength={40}
        disabled={disabled}
        value={value}
        onChange={(event) => onText(event.target.value)}
      />
    </Field>
  );
}
