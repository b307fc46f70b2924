import { downloadRevisionInput, downloadRevisionPdf, type RevisionSummary } from '@farlug/contract/routes';
import { useState } from 'react';
import { formatMoment, formatPercent, shortHash } from '../../../lib/format.ts';
import { SCENARIO_WORDS } from '../../../lib/job-words.ts';
import { revisionLetter } from '../../../lib/revision-letter.ts';
import { routeUrl } from '../../../lib/route-url.ts';
import { Button, FileButton } from '../../../ui/button.tsx';
import { VerdictFigure } from '../../../ui/verdict.tsx';
import type { ReportActions } from '../hooks/use-report-actions.ts';
import { Decisions } from './decisions.tsx';
import { Deliveries } from './deliveries.tsx';
import { PaperDecisionDialog } from './paper-decision-dialog.tsx';
import { SendDialog } from './send-dialog.tsx';

interface RevisionPlateProps {
  firm: string;
  job: string;
  revision: RevisionSummary;
  newest: boolean;
  /** `null` for who only reads. */
  actions: ReportActions | null;
}

/** One revision: what it pins, to whom it went, what was decided. */
export function RevisionPlate({ firm, job, revision, newest, actions }: RevisionPlateProps) {
  const [open, setOpen] = useState<'send' | 'decide' | null>(null);
  const letter = revisionLetter(revision.no);
  const at = { firm, job, revision: revision.id };
  return (
    <section aria-label={`Revision ${letter}`} className="border-b border-ink bg-sheet pb-3">
      <header className="flex flex-wrap items-start gap-x-4 gap-y-2 px-4 pt-3">
        <div className="min-w-0">
          <h2 className="text-title">Revision {letter}</h2>
          <p className="text-label text-ink-soft">
            Issued {formatMoment(revision.issuedAt)} by {revision.issuedBy}, from change {revision.seq}.{' '}
            {SCENARIO_WORDS[revision.scenario].label}. Input{' '}
            <abbr title={revision.sha256} className="font-code no-underline">
              {shortHash(revision.sha256)}
            </abbr>
            , solver {revision.solverVersion}
          </p>
        </div>
        <p className="flex flex-wrap gap-x-4 text-grid desk:ml-auto">
          <VerdictFigure kind={revision.over > 0 ? 'over' : 'within'} word="">
            {revision.over} over
          </VerdictFigure>
          <VerdictFigure kind="near" word="">
            {revision.near} near
          </VerdictFigure>
          <VerdictFigure kind="within" word="">
            {revision.within} within
          </VerdictFigure>
          {revision.worstPercent !== null && (
            <span className="text-ink-soft">worst {formatPercent(revision.worstPercent)}</span>
          )}
        </p>
      </header>
      <div className="flex flex-wrap gap-2 px-4 py-3" data-print="never">
        {revision.pdf === 'ready' ? (
          <FileButton href={routeUrl(downloadRevisionPdf, at)} target="_blank" rel="noreferrer" look="line">
            Open the PDF
          </FileButton>
        ) : (
          <Button disabled>
            {revision.pdf === 'failed' ? 'The PDF could not be made' : 'The PDF is being made'}
          </Button>
        )}
        <FileButton href={routeUrl(downloadRevisionInput, at)} download>
          Download the pinned input
        </FileButton>
        {actions && (
          <>
            <Button
              look={newest && revision.deliveries.length === 0 ? 'line' : 'plain'}
              onClick={() => setOpen('send')}
            >
              Send to an inspector
            </Button>
            <Button onClick={() => setOpen('decide')}>Enter a decision from paper</Button>
          </>
        )}
      </div>
      <Deliveries deliveries={revision.deliveries} letter={letter} actions={actions} />
      <Decisions decisions={revision.decisions} letter={letter} />
      {open === 'send' && actions && (
        <SendDialog
          letter={letter}
          onClose={() => setOpen(null)}
          send={(body) => actions.send(revision.id, body)}
        />
      )}
      {open === 'decide' && actions && (
        <PaperDecisionDialog
          letter={letter}
          onClose={() => setOpen(null)}
          decide={(body) => actions.decide(revision.id, body)}
        />
      )}
    </section>
  );
}
