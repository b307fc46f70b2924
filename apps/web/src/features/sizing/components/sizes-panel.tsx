import { digitsAgainst, formatFixed } from '@farlug/solver/units';
import { Link } from 'react-router-dom';
import { paths } from '../../../app/paths.ts';
import { useOpenJob, useReplica } from '../../../job/open-job.tsx';
import { useAnswer, useScenario } from '../../../job/use-result.ts';
import { cx } from '../../../ui/cx.ts';
import { SheetSection } from '../../../ui/side-sheet.tsx';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { VerdictFigure } from '../../../ui/verdict.tsx';
import type { SizeFigures } from '../../../workers/answer-sizes.ts';
import { groundingText, passesTo, shortSizeText, shownVerdict } from '../size-words.ts';
import { UseSizeButton } from './use-size-button.tsx';

/** A few sizes around the present one, and the thinnest that mends what falls short. */
export function SizesPanel({ run }: { run: string }) {
  const { firm, job, archived } = useOpenJob();
  const { rows } = useReplica();
  const [scenario] = useScenario();
  const answer = useAnswer({ kind: 'sizes', run });
  const row = rows.run.get(run);
  const all = (
    <Link to={paths.sizes(firm, job, { run, scenario: scenario === 'each-circuit' ? null : scenario })}>
      All sizes
    </Link>
  );
  if (answer === null)
    return (
      <SheetSection title="Sizes side by side">
        <p role="status" className="text-grid text-ink-soft">
          Solving the job once for every size…
        </p>
      </SheetSection>
    );
  if (answer.kind === 'none') return null;
  const offered = mends(answer.sizes);
  const near = around(answer.sizes, offered);
  return (
    <SheetSection title="Sizes side by side">
      <Table caption="Sizes around the present one">
        <thead>
          <tr>
            <Th className="pl-0!">Size</Th>
            <Th numeric>Total</Th>
            <Th numeric>Passes to</Th>
            <Th numeric className="pr-0!">
              Grounding
            </Th>
          </tr>
        </thead>
        <tbody>
          {near.map((size) => (
            <tr key={`${size.size} ${size.sets}`} className={cx(size.now && 'bg-wash')}>
              <RowHead className="pl-0! font-normal">
                {shortSizeText(size)} {size.now && <span className="text-label text-ink-soft">now</span>}
                {size.needsOverride && <span className="text-label text-over"> below floor</span>}
              </RowHead>
              <Td numeric>
                <VerdictFigure kind={shownVerdict(size)}>{totalText(size)}</VerdictFigure>
              </Td>
              <Td numeric>{passesTo(size, [...rows.job.values()][0]!.lengthUnit)}</Td>
              <Td numeric className="pr-0!">
                {groundingText(size)}
              </Td>
            </tr>
          ))}
        </tbody>
      </Table>
      <div className="mt-2 flex flex-wrap items-center gap-3">
        {offered && !archived && !row?.locked && <UseSizeButton run={run} size={offered} look="go" />}
        {all}
      </div>
    </SheetSection>
  );
}

const totalText = ({ worst }: SizeFigures): string =>
  worst ? `${formatFixed(worst.totalPercent, digitsAgainst(worst.totalPercent, worst.limitPercent))} %` : '';

/** The thinnest size from the present one on that leaves nothing over beyond; null where none does or none is needed. */
function mends(sizes: readonly SizeFigures[]): SizeFigures | null {
  const now = sizes.findIndex((size) => size.now);
  if (now < 0 || sizes[now]!.overBeyond === 0) return null;
  return sizes.slice(now + 1).find((size) => size.overBeyond === 0 && !size.needsOverride) ?? null;
}

function around(sizes: readonly SizeFigures[], offered: SizeFigures | null): SizeFigures[] {
  const now = Math.max(
    sizes.findIndex((size) => size.now),
    0,
  );
  const last = Math.max(now + 2, offered ? sizes.indexOf(offered) + 1 : 0);
  return sizes.slice(Math.max(now - 1, 0), Math.min(last + 1, now + 6));
}
