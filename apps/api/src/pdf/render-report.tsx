import type { RevisionInput } from '@farlug/contract/routes';
import type { Job, Scenario, Solution } from '@farlug/solver/job';
import { solveJob } from '@farlug/solver/judge';
import { Document, renderToBuffer } from '@react-pdf/renderer';
import type { RevisionFacts } from '../worker/worker-deps.ts';
import { ClosingSection } from './closing-section.tsx';
import { EquationsSection } from './equations-section.tsx';
import { HandCheckSection } from './hand-check-section.tsx';
import { reportFigures } from './report-figures.ts';
import { ScheduleSection } from './schedule-section.tsx';
import { SummarySection } from './summary-section.tsx';
import { registerFonts } from './theme.ts';

/** The printed form of a revision: everything in it follows from the pinned input and the solver. */
export async function renderReport(
  input: RevisionInput,
  facts: RevisionFacts,
): Promise<{ bytes: Buffer; pages: number }> {
  registerFonts();
  const figures = reportFigures(input, solve);
  const { job, firm } = input.titleBlock;
  const bytes = await renderToBuffer(
    <Document
      title={`${job}: voltage drop report, revision ${facts.revisionLetter}`}
      author={firm}
      subject={`Input ${facts.sha256}`}
      creator="Farlug"
      producer="Farlug"
      language="en"
      creationDate={new Date(facts.issuedAt)}
    >
      <SummarySection figures={figures} facts={facts} />
      <ScheduleSection figures={figures} facts={facts} />
      <EquationsSection figures={figures} facts={facts} />
      <HandCheckSection figures={figures} facts={facts} />
      <ClosingSection figures={figures} facts={facts} />
    </Document>,
  );
  return { bytes, pages: bytes.toString('latin1').match(/\/Type \/Page\b(?!s)/g)?.length ?? 0 };
}

function solve(job: Job, scenario: Scenario): Solution {
  const outcome = solveJob(job, { scenario });
  if (outcome.kind === 'solved') return outcome.solution;
  throw new Error(`${outcome.at}: ${outcome.reason}`);
}
