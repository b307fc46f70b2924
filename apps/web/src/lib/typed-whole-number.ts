/** A typed whole number, or `null` where it is none. */
export function typedWholeNumber(text: string): number | null {
  const digits = text.trim().replace(/[,\s\u202f]/g, '');
  return /^-?\d{1,9}$/.test(digits) ? Number(digits) : null;
}
