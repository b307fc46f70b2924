import { cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { afterEach, expect, test } from 'vitest';
import { Checkbox } from './checkbox.tsx';
import { Field } from './field.tsx';
import { Segmented } from './segmented.tsx';
import { Select } from './select.tsx';
import { TextInput } from './text-input.tsx';

afterEach(cleanup);

const describedBy = (element: HTMLElement) =>
  (element.getAttribute('aria-describedby') ?? '')
    .split(' ')
    .map((id) => document.getElementById(id)?.textContent ?? '')
    .join(' ');

test('a field names its control, describes it by hint and error, and says when it is wrong', () => {
  const { rerender } = render(
    <Field label="Length" hint="As 120 ft.">
      <TextInput defaultValue="long" />
    </Field>,
  );
  const input = screen.getByLabelText('Length');
  expect(describedBy(input)).toBe('As 120 ft.');
  expect(input.hasAttribute('aria-invalid')).toBe(false);
  rerender(
    <Field label="Length" hint="As 120 ft." error="Enter a length, as 120 ft." required>
      <TextInput defaultValue="long" />
    </Field>,
  );
  expect(input.getAttribute('aria-invalid')).toBe('true');
  expect(input.getAttribute('aria-required')).toBe('true');
  expect(describedBy(input)).toContain('Enter a length');
  expect((input as HTMLInputElement).value).toBe('long');
});

function Choices() {
  const [unit, setUnit] = useState<'ft' | 'm' | null>(null);
  const [system, setSystem] = useState<'a' | 'b'>('a');
  const [counted, setCounted] = useState(false);
  return (
    <>
      <Field label="Lengths" error={unit === null ? 'Choose one.' : null}>
        <Segmented
          value={unit}
          onValue={setUnit}
          choices={[
            { value: 'ft', label: 'Feet' },
            { value: 'm', label: 'Metres' },
          ]}
        />
      </Field>
      <Field label="System">
        <Select
          value={system}
          onValue={setSystem}
          choices={[
            { value: 'a', label: 'Wye' },
            { value: 'b', label: 'Delta' },
          ]}
        />
      </Field>
      <Checkbox
        checked={counted}
        onChecked={setCounted}
        label="Counts the service"
        hint="As the preset says."
      />
    </>
  );
}

test('a segmented choice is a named group of radios that the keyboard walks', async () => {
  const user = userEvent.setup();
  render(<Choices />);
  const group = screen.getByRole('radiogroup', { name: 'Lengths' });
  expect(group.getAttribute('aria-invalid')).toBe('true');
  await user.click(screen.getByRole('radio', { name: 'Feet' }));
  expect(screen.getByRole('radio', { name: 'Feet' }).getAttribute('aria-checked')).toBe('true');
  expect(group.hasAttribute('aria-invalid')).toBe(false);
  await user.keyboard('{ArrowRight}');
  expect(document.activeElement?.textContent).toBe('Metres');
});

test('a select and a checkbox hand on what was chosen', async () => {
  const user = userEvent.setup();
  render(<Choices />);
  await user.selectOptions(screen.getByRole('combobox', { name: 'System' }), 'Delta');
  expect((screen.getByRole('combobox', { name: 'System' }) as HTMLSelectElement).value).toBe('b');
  const box = screen.getByRole('checkbox', { name: 'Counts the service' });
  await user.click(box);
  expect(box.getAttribute('aria-checked')).toBe('true');
  expect(describedBy(box)).toBe('As the preset says.');
});
