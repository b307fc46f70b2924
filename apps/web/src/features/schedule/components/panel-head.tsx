import type { JobRows } from '@farlug/contract/rows';
import type { PanelView } from '@farlug/contract/schedule';
import { formatPercent } from '@farlug/solver/units';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { MissingBox } from '../../../ui/missing-box.tsx';
import { PageHeading } from '../../../ui/page-heading.tsx';
import { VerdictFigure } from '../../../ui/verdict.tsx';
import type { JobResult } from '../../../workers/results.ts';
import { runText } from '../columns.ts';

interface PanelHeadProps {
  rows: JobRows;
  panel: PanelView;
  result: JobResult | null;
  /** The address of a circuit, where the panel's feeder is one. */
  to: (circuitId: string) => string;
  /** On a phone: the choice of another panel, in place of the name. */
  chooser: ReactNode;
  actions: ReactNode;
}

/** A panel's name, its supply and feeder, and what the feeder drops. */
export function PanelHead({ rows, panel, result, to, chooser, actions }: PanelHeadProps) {
  const { panel: row, bus, system, fedFrom, fedFromText } = panel;
  const place = [row.building, row.area].filter(Boolean).join(', ');
  const about = [
    place,
    system ?? 'no supply yet',
    `${row.spaces} spaces`,
    row.mainAmps ? `${row.mainAmps} A main` : null,
  ].filter(Boolean);
  return (
    <PageHeading
      title={chooser ?? panel.code}
      aside={bus.name}
      actions={actions}
      detail={
        <>
          {about.join(', ')},{' '}
          {fedFrom === null ? (
            'fed from nothing yet'
          ) : (
            <>
              fed from{' '}
              {fedFrom.circuitId === null ? (
                fedFromText
              ) : (
                <Link to={to(fedFrom.circuitId)}>{fedFromText}</Link>
              )}{' '}
              <Feeder rows={rows} runIds={fedFrom.runIds} />
            </>
          )}
          <FeederPart panel={panel} result={result} />
        </>
      }
    />
  );
}

function Feeder({ rows, runIds }: { rows: JobRows; runIds: readonly string[] }) {
  const run = rows.run.get(runIds.at(-1) ?? '');
  if (!run) return null;
  return (
    <>
      by {run.code}: {runText(run)}, {run.length ?? <MissingBox what="length" />}
    </>
  );
}

function FeederPart({ panel, result }: Pick<PanelHeadProps, 'panel' | 'result'>) {
  const figures = result?.panels.get(panel.id);
  if (!figures || figures.feederPercent === null) return null;
  const text = formatPercent(figures.feederPercent, 2);
  const missed = figures.shown === 'over' || figures.shown === 'rise';
  return <>. Feeder part {missed ? <VerdictFigure kind={figures.shown}>{text}</VerdictFigure> : text}</>;
}
