import { z } from 'zod';
import { isStorable } from '../rows/fields.ts';

export const none = z.strictObject({});
export const empty = z.strictObject({}).optional();
export const ok = z.strictObject({ ok: z.literal(true) });
export const instant = z.iso.datetime();
const NO_TEXT = 'Leave out the characters that are no text.';
export const name = z
  .string()
  .trim()
  .min(1, 'Enter a name.')
  .max(200, 'Use at most 200 characters.')
  .refine(isStorable, NO_TEXT);
export const email = z
  .email('Enter an e-mail address, as name@firm.example.')
  .max(254, 'Use at most 254 characters.')
  .transform((value) => value.toLowerCase());
export const freshPassword = z
  .string()
  .min(12, 'Use at least 12 characters.')
  .max(200, 'Use at most 200 characters.');
export const token = z.string().min(20).max(200);
export const firmParams = z.strictObject({ firm: z.uuid() });
export const jobParams = z.strictObject({ firm: z.uuid(), job: z.uuid() });
export const freeText = (max: number) =>
  z.string().trim().max(max, `Use at most ${max} characters.`).refine(isStorable, NO_TEXT);
/** Kept or looked for as it is, blanks and all. */
export const exactText = (max: number) => z.string().max(max).refine(isStorable, NO_TEXT);
