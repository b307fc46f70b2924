import { typedWholeNumber } from '../../lib/typed-whole-number.ts';

export const LINK_DAYS_DEFAULT = '30';
export const LINK_DAYS_RIGHT = 'Enter days from 1 to 365, as 30.';

/** Days that a link works, or `null` where what was typed is none. */
export function linkDays(text: string): number | null {
  const days = typedWholeNumber(text.replace(/\s*days?$/i, ''));
  return days !== null && days >= 1 && days <= 365 ? days : null;
}
