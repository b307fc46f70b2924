import type { Audit, Tree } from './audit.ts';

const name = /^docs\/decisions\/(\d{4})-[a-z0-9]+(?:-[a-z0-9]+)*\.md$/;
const sections = ['Context', 'Decision', 'Consequences'];

function problemsOf(tree: Tree, file: string, expected: number): string[] {
  const number = name.exec(file)?.[1];
  if (number === undefined) return [`${file}: the name is NNNN-title-in-kebab-case.md`];
  const text = tree.read(file);
  const problems: string[] = [];
  if (Number(number) !== expected) problems.push(`the number after ${expected - 1} is ${expected}`);
  if (!text.startsWith(`# ${Number(number)}. `)) problems.push(`it begins with "# ${Number(number)}. Title"`);
  if (!/^- Date: \d{4}-\d{2}-\d{2}$/m.test(text)) problems.push('it has a line "- Date: YYYY-MM-DD"');
  if (!/^- Status: (?:accepted|proposed|superseded by \[\d{4}\]\(\d{4}-[^)]+\))$/m.test(text)) {
    problems.push('it has a line "- Status: accepted" (or proposed, or superseded by a link)');
  }
  const found = [...text.matchAll(/^## (.+)$/gm)].map((match) => match[1]);
  if (found.join() !== sections.join()) problems.push(`its sections are ${sections.join(', ')}`);
  return problems.map((problem) => `${file}: ${problem}`);
}

export const audit: Audit = {
  name: 'decisions are recorded in one shape',
  find: (tree) => {
    const files = tree.files.filter(
      (file) => file.startsWith('docs/decisions/') && !file.endsWith('/README.md'),
    );
    if (files.length === 0) return ['docs/decisions: there is no decision'];
    return files.flatMap((file, index) => problemsOf(tree, file, index + 1));
  },
};
