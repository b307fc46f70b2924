import type { ComponentProps } from 'react';
import { cx } from './cx.ts';
import { useFieldWiring } from './field.tsx';

export interface Choice<T extends string = string> {
  value: T;
  label: string;
  disabled?: boolean;
  /** Under which heading of the list it stands. */
  group?: string;
}

interface SelectProps<T extends string> extends Omit<ComponentProps<'select'>, 'value' | 'onChange'> {
  value: T;
  onValue: (value: T) => void;
  choices: readonly Choice<T>[];
  /** Without edges, in copper: the scenario of a title block. */
  bare?: boolean;
}

/** The platform's own list: the one that a phone, a screen reader and a keyboard know best. */
export function Select<T extends string>({
  value,
  onValue,
  choices,
  bare = false,
  className,
  id,
  ...rest
}: SelectProps<T>) {
  return (
    <span className={cx('relative', bare ? 'inline-block max-w-full' : 'block')}>
      <select
        {...useFieldWiring(id)}
        value={value}
        onChange={(event) => onValue(event.target.value as T)}
        className={cx(
          'appearance-none rounded-control text-ellipsis',
          bare
            ? 'max-w-full bg-transparent pr-5 font-bold text-copper'
            : 'h-12 w-full border border-line bg-sheet pr-8 pl-3 text-body text-ink aria-invalid:border-2 aria-invalid:border-over disabled:border-rule disabled:bg-faint disabled:text-ink-soft desk:h-10',
          className,
        )}
        {...rest}
      >
        {choices.filter((choice) => !choice.group).map(optionOf)}
        {[...new Set(choices.map((choice) => choice.group))].map(
          (group) =>
            group && (
              <optgroup key={group} label={group} className="bg-sheet font-normal text-ink">
                {choices.filter((choice) => choice.group === group).map(optionOf)}
              </optgroup>
            ),
        )}
      </select>
      <svg
        viewBox="0 0 10 6"
        aria-hidden="true"
        className={cx(
          'pointer-events-none absolute top-1/2 h-1.5 w-2.5 -translate-y-1/2 fill-current text-copper',
          bare ? 'right-0.5' : 'right-3',
        )}
      >
        <path d="M0 0h10L5 6Z" />
      </svg>
    </span>
  );
}

const optionOf = (choice: Choice) => (
  <option
    key={choice.value}
    value={choice.value}
    disabled={choice.disabled}
    className="bg-sheet font-normal text-ink"
  >
    {choice.label}
  </option>
);
