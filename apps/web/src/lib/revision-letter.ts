/** Revisions are counted and named A, B, … Z, AA, as on drawings. */
export function revisionLetter(no: number): string {
  let rest = no;
  let letters = '';
  while (rest > 0) {
    letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
    rest = Math.floor((rest - 1) / 26);
  }
  return letters;
}
