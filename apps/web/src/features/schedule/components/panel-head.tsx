import type { PanelView } from '@farlug/contract/schedule';
import { formatPercentAgainst } from '@farlug/solver/units';
import type { ReactNode } from 'react';
import { Verdict } from '../../../ui/verdict.tsx';
import type { JobResult } from '../../../workers/results.ts';

interface PanelHeadProps {
  panel: PanelView;
  result: JobResult | null;
  feederLimit: number | null;
  actions: ReactNode;
}

/** A panel's name, what feeds it, and how its feeder stands at design demand. */
export function PanelHead({ panel, result, feederLimit, actions }: PanelHeadProps) {
  const figures = result?.panels.get(panel.id) ?? null;
  const main = panel.panel.mainAmps;
  const about = [
    panel.system ?? 'not fed yet',
    panel.fedFromText && `fed from ${panel.fedFromText}`,
    main && `main ${Number(main)} A`,
    `${panel.panel.spaces} spaces`,
    panel.panel.area ?? panel.panel.building,
  ].filter(Boolean);
  return (
    <header className="flex flex-none flex-wrap items-center gap-x-4 gap-y-2 px-4 py-2.5">
      <div className="min-w-0">
        <h1 className="text-title">
          <b>{panel.code}</b> {panel.bus.name}
        </h1>
        <p className="text-grid text-ink-soft">
          {about.join(', ')}
          {figures && figures.feederPercent !== null && (
            <>
              {'. Feeder part '}
              {formatPercentAgainst(figures.feederPercent, feederLimit)} <Verdict kind={figures.shown} />
            </>
          )}
        </p>
      </div>
      <div className="flex flex-wrap items-center gap-2 desk:ml-auto">{actions}</div>
    </header>
  );
}
