import { RadioGroup } from 'radix-ui';
import { cx } from './cx.ts';
import { useFieldLabelId, useFieldWiring } from './field.tsx';
import type { Choice } from './select.tsx';

interface SegmentedProps<T extends string> {
  /** Read aloud; leave out inside a `Field`, whose label names it. */
  label?: string;
  value: T | null;
  onValue: (value: T) => void;
  choices: readonly Choice<T>[];
  /** Fills its line, as on the phone. */
  wide?: boolean;
  disabled?: boolean;
}

/** One of a few, all in view. */
export function Segmented<T extends string>({
  label,
  value,
  onValue,
  choices,
  wide = false,
  disabled,
}: SegmentedProps<T>) {
  const wiring = useFieldWiring();
  const labelId = useFieldLabelId();
  return (
    <RadioGroup.Root
      id={wiring.id}
      aria-describedby={wiring['aria-describedby']}
      aria-invalid={wiring['aria-invalid']}
      aria-label={label}
      aria-labelledby={label ? undefined : labelId}
      value={value ?? ''}
      disabled={disabled}
      onValueChange={(next) => onValue(next as T)}
      orientation="horizontal"
      className={cx(
        'rounded-control border border-rule bg-sheet',
        wide ? 'flex flex-wrap' : 'inline-flex flex-wrap',
      )}
    >
      {choices.map((choice) => (
        <RadioGroup.Item
          key={choice.value}
          value={choice.value}
          disabled={choice.disabled}
          className={cx(
            '-ml-px min-h-11 border-l border-rule px-3 text-grid text-ink-soft first:ml-0 first:border-l-0 hover:text-ink',
            'data-[state=checked]:font-bold data-[state=checked]:text-ink data-[state=checked]:underline-none',
            'relative data-[state=checked]:after:absolute data-[state=checked]:after:inset-x-0 data-[state=checked]:after:bottom-0 data-[state=checked]:after:h-0.5 data-[state=checked]:after:bg-copper',
            'disabled:text-ink-soft',
            wide ? 'flex-1 desk:min-h-10' : 'desk:min-h-7.5',
          )}
        >
          {choice.label}
        </RadioGroup.Item>
      ))}
    </RadioGroup.Root>
  );
}
