import type { PanelView } from '@farlug/contract/schedule';
import { formatFixed } from '@farlug/solver/units';
import type { JobResult } from '../../../workers/results.ts';

interface PanelFootProps {
  panel: PanelView;
  result: JobResult | null;
}

const kva = (va: number) => `${formatFixed(va / 1000, 1)} kVA`;

/** Connected and design demand per line, amps of the feeder as solved, unbalance, spaces open. */
export function PanelFootRow({ panel, result }: PanelFootProps) {
  const { foot } = panel;
  const feeder = panel.fedFrom?.runIds.at(-1);
  const solved = feeder === undefined ? null : (result?.runs.get(feeder)?.amps ?? null);
  return (
    <section
      aria-label={`Foot of ${panel.code}`}
      className="flex flex-none flex-wrap gap-x-8 gap-y-2 border-t border-ink bg-sheet px-4 py-2 text-grid"
    >
      <table className="text-right whitespace-nowrap">
        <caption className="sr-only">Loads per line of {panel.code}</caption>
        <thead className="text-label text-ink-soft">
          <tr>
            <th scope="col" className="pr-4 text-left font-normal">
              Foot of panel
            </th>
            {foot.lines.map(({ line }) => (
              <th key={line} scope="col" className="pl-4 font-normal">
                {line}
              </th>
            ))}
            {solved?.N !== undefined && (
              <th scope="col" className="pl-4 font-normal">
                N
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          <FootLine word="Connected" figures={foot.lines.map((line) => kva(line.connectedVa))} />
          <FootLine word="Design demand" figures={foot.lines.map((line) => kva(line.demandVa))} />
          {solved && (
            <FootLine
              word="Amps in the feeder, design"
              strong
              figures={[
                ...foot.lines.map(({ line }) => `${formatFixed(solved[line as 'L1'] ?? 0, 0)} A`),
                ...(solved.N === undefined ? [] : [`${formatFixed(solved.N, 0)} A`]),
              ]}
            />
          )}
        </tbody>
      </table>
      <dl className="grid grid-cols-[auto_auto] content-start gap-x-4">
        <dt className="text-ink-soft">Unbalance</dt>
        <dd className="text-right font-bold">
          {foot.unbalancePercent === null ? 'no load' : `${formatFixed(foot.unbalancePercent, 0)} %`}
        </dd>
        <dt className="text-ink-soft">Spaces open</dt>
        <dd className="text-right font-bold">
          {foot.spacesOpen} of {foot.spaces}
        </dd>
        {foot.unknown > 0 && (
          <>
            <dt className="text-ink-soft">Loads without a size</dt>
            <dd className="text-right font-bold">{foot.unknown}</dd>
          </>
        )}
      </dl>
    </section>
  );
}

function FootLine({
  word,
  figures,
  strong = false,
}: {
  word: string;
  figures: readonly string[];
  strong?: boolean;
}) {
  return (
    <tr>
      <th scope="row" className="pr-4 text-left font-normal text-ink-soft">
        {word}
      </th>
      {figures.map((figure, i) => (
        <td key={i} className={strong ? 'pl-4 font-bold' : 'pl-4'}>
          {figure}
        </td>
      ))}
    </tr>
  );
}
