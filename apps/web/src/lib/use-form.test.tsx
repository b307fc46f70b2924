import { cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, expect, test } from 'vitest';
import { z } from 'zod';
import { Field } from '../ui/field.tsx';
import { Form } from '../ui/form.tsx';
import { TextInput } from '../ui/text-input.tsx';
import { ApiError } from './api-error.ts';
import { useForm } from './use-form.ts';

afterEach(cleanup);

const schema = z.object({ name: z.string().min(1, 'Enter a name.'), code: z.string() });

function Example({
  submit,
}: {
  submit: (values: { name: string; code: string }) => Promise<ApiError | null>;
}) {
  const form = useForm({ initial: { name: '', code: 'A-1' }, schema, submit });
  return (
    <Form label="Example" onSubmit={form.onSubmit} error={form.formError} busy={form.busy} action="Save">
      {(['name', 'code'] as const).map((field) => (
        <Field key={field} label={field} error={form.errors[field]}>
          <TextInput value={form.values[field]} onChange={(event) => form.set(field, event.target.value)} />
        </Field>
      ))}
    </Form>
  );
}

test('nothing is sent while a field is wrong; the message stands at the field and goes when it is right', async () => {
  const user = userEvent.setup();
  const sent: unknown[] = [];
  render(
    <Example
      submit={async (values) => {
        sent.push(values);
        return null;
      }}
    />,
  );
  await user.click(screen.getByRole('button', { name: 'Save' }));
  expect(sent).toEqual([]);
  const name = screen.getByLabelText('name');
  expect(name.getAttribute('aria-invalid')).toBe('true');
  expect(screen.getByText(/Enter a name/)).toBeTruthy();
  await user.type(name, 'LP-2');
  expect(screen.queryByText(/Enter a name/)).toBeNull();
  await user.click(screen.getByRole('button', { name: 'Save' }));
  expect(sent).toEqual([{ name: 'LP-2', code: 'A-1' }]);
});

test('what the server refuses stands at its field or on the form, and what was typed stays', async () => {
  const user = userEvent.setup();
  const refusals = [
    new ApiError('invalid', 'Some fields are wrong.', 422, 'r', [
      { path: 'body.code', message: 'This code is taken.' },
    ]),
    new ApiError('invalid', 'The job was not made.', 422, 'r', [
      { path: 'rows.source.0.volts', message: 'must be > 0' },
    ]),
    new ApiError('unreachable', 'The server cannot be reached.'),
  ];
  render(<Example submit={async () => refusals.shift() ?? null} />);
  await user.type(screen.getByLabelText('name'), 'LP-2');
  await user.click(screen.getByRole('button', { name: 'Save' }));
  expect(await screen.findByText(/This code is taken/)).toBeTruthy();
  await user.type(screen.getByLabelText('code'), '2');
  expect(screen.queryByText(/This code is taken/)).toBeNull();
  await user.click(screen.getByRole('button', { name: 'Save' }));
  expect((await screen.findByRole('alert')).textContent).toContain(
    'The job was not made. rows.source.0.volts: must be > 0',
  );
  await user.click(screen.getByRole('button', { name: 'Save' }));
  expect(await screen.findByText(/cannot be reached/)).toBeTruthy();
  expect((screen.getByLabelText('code') as HTMLInputElement).value).toBe('A-12');
});
