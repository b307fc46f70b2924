import { builtLength, ROUTE_ALLOWANCE } from '@farlug/contract/schedule';
import type { LengthUnit } from '@farlug/solver/job';
import { parseNumber } from '@farlug/solver/units';
import { useState } from 'react';
import { Button } from '../../../ui/button.tsx';
import { Field } from '../../../ui/field.tsx';
import { TextInput } from '../../../ui/text-input.tsx';

interface RouteLengthProps {
  unit: LengthUnit;
  /** What was wrong; null where it was taken. */
  onTake: (length: string) => string | null;
}

const PARTS = [
  ['across', 'Across'],
  ['along', 'Along'],
  ['drops', 'Drops'],
] as const;
type Part = (typeof PARTS)[number][0];

const read = (text: string) => (text.trim() === '' ? null : parseNumber(text, { min: 0, max: 20_000 }));

/** A length from a right-angled route as it is scaled from a plan. */
export function RouteLength({ unit, onTake }: RouteLengthProps) {
  const [typed, setTyped] = useState<Record<Part, string>>({ across: '', along: '', drops: '' });
  const { atPanel, step } = ROUTE_ALLOWANCE[unit];
  const values = PARTS.map(([part]) => read(typed[part]));
  const given = values.some((one) => one !== null);
  const right = values.every((one) => one === null || one.ok);
  const value = (i: number) => {
    const one = values[i];
    return one?.ok ? one.value : '0';
  };
  const length =
    given && right ? builtLength({ across: value(0), along: value(1), drops: value(2) }, unit) : null;
  return (
    <details className="mt-2 text-grid">
      <summary className="tap flex items-center text-copper underline underline-offset-3">
        Work it out from the route
      </summary>
      <div className="grid grid-cols-3 gap-2">
        {PARTS.map(([part, label], i) => {
          const one = values[i];
          return (
            <Field
              key={part}
              label={`${label}, ${unit}`}
              error={one && !one.ok ? 'A number, as 24.5.' : null}
            >
              <TextInput
                inputMode="decimal"
                maxLength={12}
                value={typed[part]}
                onChange={(event) => setTyped({ ...typed, [part]: event.target.value })}
              />
            </Field>
          );
        })}
      </div>
      <p className="my-2 text-label text-ink-soft">
        With {atPanel} {unit} left at the panel and 10 % on top, up to the next {step} {unit} (common
        practice).
      </p>
      <Button disabled={length === null} onClick={() => length !== null && onTake(length)}>
        {length === null ? 'Take the length' : `Take ${length}, scaled`}
      </Button>
    </details>
  );
}
