/** `must be …` after the name of its field; whole sentences stay as they are. */
export function problemWords(label: string, problem: string): string {
  if (!/^[a-z]/.test(problem)) return problem;
  const text = `${label} ${problem}`;
  return /[.!?]$/.test(text) ? text : `${text}.`;
}
