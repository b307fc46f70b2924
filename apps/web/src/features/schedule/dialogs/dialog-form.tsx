import type { ComponentProps } from 'react';
import { Form } from '../../../ui/form.tsx';

const BAR = [
  '[&>:last-child]:sticky [&>:last-child]:-bottom-3 [&>:last-child]:z-10 [&>:last-child]:-mx-4 [&>:last-child]:-mb-3',
  '[&>:last-child]:border-t [&>:last-child]:border-rule [&>:last-child]:bg-paper [&>:last-child]:px-4 [&>:last-child]:py-3',
  '[&_input]:scroll-mb-28 [&_select]:scroll-mb-28 [&_summary]:scroll-mb-28 [&_button]:scroll-mb-28',
].join(' ');

/** A long form in a dialog: its buttons stay in view, and what takes the focus is not hidden by them. */
export function DialogForm(props: ComponentProps<typeof Form>) {
  return <Form className={BAR} {...props} />;
}
