import type { LengthUnit } from '@farlug/solver/job';
import type { ReactNode } from 'react';
import { Field } from '../../../ui/field.tsx';
import { TextInput } from '../../../ui/text-input.tsx';
import type { Echo } from './echoes.ts';

interface TypedInputProps {
  label: string;
  value: string;
  onText: (text: string) => void;
  error?: string | undefined;
  /** What may be typed; gives way to what was understood. */
  hint?: ReactNode;
  echo?: Echo | undefined;
  lengthUnit?: LengthUnit;
  required?: boolean;
  maxLength?: number;
  className?: string;
}

/** Text with its units as typed, and what was understood of it. */
export function TypedInput({
  label,
  value,
  onText,
  error,
  hint,
  echo,
  lengthUnit = 'ft',
  required = false,
  maxLength = 400,
  className = '',
}: TypedInputProps) {
  const understood = error ? null : echo?.(value, lengthUnit);
  return (
    <Field label={label} error={error} hint={understood ?? hint} required={required} className={className}>
      <TextInput value={value} maxLength={maxLength} onChange={(event) => onText(event.target.value)} />
    </Field>
  );
}
