import { useState } from 'react';
import { Field } from '../../../ui/field.tsx';
import { TextInput } from '../../../ui/text-input.tsx';

interface TypedFieldProps {
  label: React.ReactNode;
  hint: string | null;
  hideLabel?: boolean;
  className?: string;
  /** As it stands in the row. */
  text: string;
  readOnly: boolean;
  /** Takes what was typed; what was not understood comes back in words. */
  onTake: (text: string) => string | null;
  /** The phone's field that is to be filled in. */
  active?: boolean;
}

/** Taken when it is left or Enter is pressed; what is not understood stays, with the reason. */
export function TypedField({
  label,
  hint,
  hideLabel,
  className,
  text,
  readOnly,
  onTake,
  active,
}: TypedFieldProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const [problem, setProblem] = useState<string | null>(null);
  const take = () => {
    if (typed === null) return;
    if (typed !== text) setProblem(onTake(typed));
    setTyped(null);
  };
  return (
    <Field label={label} hideLabel={hideLabel ?? false} hint={hint} error={problem} className={className}>
      <TextInput
        value={typed ?? text}
        maxLength={400}
        readOnly={readOnly}
        active={active ?? false}
        onChange={(event) => setTyped(event.target.value)}
        onBlur={take}
        onKeyDown={(event) => {
          if (event.key === 'Enter') take();
          else if (event.key === 'Escape' && typed !== null) {
            event.stopPropagation();
            setTyped(null);
          }
        }}
      />
    </Field>
  );
}
