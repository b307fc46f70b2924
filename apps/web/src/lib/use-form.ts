import { type FormEvent, useRef, useState } from 'react';
import type { z } from 'zod';
import type { ApiError } from './api-error.ts';
import { type FieldErrors, schemaErrors, serverErrors } from './form-errors.ts';

export interface Form<V extends object> {
  values: V;
  set: <K extends keyof V>(field: K, value: V[K]) => void;
  reset: (values: V) => void;
  errors: FieldErrors;
  /** What belongs to no field. */
  formError: string | null;
  busy: boolean;
  changed: boolean;
  onSubmit: (event: FormEvent<HTMLFormElement>) => void;
}

interface FormOptions<V extends object> {
  initial: V;
  /** Judges what was typed before anything is sent. */
  schema?: z.ZodType;
  check?: (values: V) => FieldErrors;
  /** Sends; `null` is success. What was typed stays either way. */
  submit: (values: V) => Promise<ApiError | null>;
}

/** A form that judges on sending, and from then on while typing; the first wrong field takes the focus. */
export function useForm<V extends object>({ initial, schema, check, submit }: FormOptions<V>): Form<V> {
  const [values, setValues] = useState(initial);
  const [tried, setTried] = useState(false);
  const [refused, setRefused] = useState<FieldErrors>({});
  const [busy, setBusy] = useState(false);
  const [changed, setChanged] = useState(false);
  const element = useRef<HTMLFormElement | null>(null);

  const judge = (given: V): FieldErrors => ({
    ...(schema ? schemaErrors(schema, given) : {}),
    ...check?.(given),
  });
  const own = tried ? judge(values) : {};
  const errors: FieldErrors = { ...refused, ...own };

  const focusFirstError = () =>
    requestAnimationFrame(() => {
      const first = element.current?.querySelector<HTMLElement>(
        '[aria-invalid="true"], fieldset:has([data-error]) input',
      );
      const inside = first?.matches('[role="radiogroup"]')
        ? first.querySelector<HTMLElement>('[role="radio"]')
        : null;
      (inside ?? first)?.focus();
    });

  async function send(): Promise<void> {
    setTried(true);
    setRefused({});
    if (Object.keys(judge(values)).length > 0) {
      focusFirstError();
      return;
    }
    setBusy(true);
    const error = await submit(values).finally(() => setBusy(false));
    if (error) {
      setRefused(serverErrors(error, values));
      focusFirstError();
    } else setChanged(false);
  }

  return {
    values,
    set: (field, value) => {
      setValues((before) => ({ ...before, [field]: value }));
      setRefused((before) => omit(before, String(field)));
      setChanged(true);
    },
    reset: (next) => {
      setValues(next);
      setTried(false);
      setRefused({});
      setChanged(false);
    },
    errors,
    formError: errors[''] ?? null,
    busy,
    changed,
    onSubmit: (event) => {
      event.preventDefault();
      element.current = event.currentTarget;
      if (!busy) void send();
    },
  };
}

function omit(errors: FieldErrors, field: string): FieldErrors {
  return Object.fromEntries(
    Object.entries(errors).filter(([path]) => path !== '' && path !== field && !path.startsWith(`${field}.`)),
  );
}
