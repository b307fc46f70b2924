import { revisionInput } from '@farlug/contract/routes';

/** `Tannery-Row-revision-B.pdf`: which job, and which state of it. */
export function reportFileName(input: unknown, no: number, ending: string): string {
  const parsed = revisionInput.safeParse(input);
  const job = parsed.success ? parsed.data.titleBlock.job : 'report';
  const stem = job
    .normalize('NFKD')
    .replace(/[^\p{L}\p{N}]+/gu, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 80);
  return `${stem || 'report'}-revision-${revisionLetter(no)}.${ending}`;
}

/** 1 is A, 26 Z, 27 AA. */
export function revisionLetter(no: number): string {
  let rest = no;
  let letters = '';
  while (rest > 0) {
    letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
    rest = Math.floor((rest - 1) / 26);
  }
  return letters;
}
