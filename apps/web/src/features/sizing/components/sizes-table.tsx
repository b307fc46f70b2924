import { digitsAgainst, formatFixed, formatWatts } from '@farlug/solver/units';
import { cx } from '../../../ui/cx.ts';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { Verdict } from '../../../ui/verdict.tsx';
import type { SizeFigures } from '../../../workers/answer-sizes.ts';
import { ampacityText, groundingText, passesTo, shownVerdict, sizeText } from '../size-words.ts';
import { UseSizeButton } from './use-size-button.tsx';

interface SizesTableProps {
  run: string;
  sizes: readonly SizeFigures[];
  feeder: boolean;
  lengthUnit: string;
  readOnly: boolean;
}

/** Every size side by side; the one that is drawn is marked. */
export function SizesTable({ run, sizes, feeder, lengthUnit, readOnly }: SizesTableProps) {
  return (
    <Table caption="Sizes side by side" stacked>
      <thead>
        <tr>
          <Th>Size</Th>
          <Th numeric>Ampacity</Th>
          <Th numeric>Drop</Th>
          <Th numeric>{feeder ? 'Feeder, worst panel' : 'Total, worst load'}</Th>
          <Th>Verdict beyond</Th>
          <Th numeric>Over beyond</Th>
          <Th numeric>Passes to</Th>
          <Th numeric>Loss</Th>
          <Th numeric>Grounding</Th>
          <Th>
            <span className="sr-only">Use</span>
          </Th>
        </tr>
      </thead>
      <tbody>
        {sizes.map((size) => (
          <tr
            key={`${size.material} ${size.size} ${size.sets}`}
            aria-current={size.now || undefined}
            className={cx(size.now && 'bg-wash [&>:first-child]:border-l-3 [&>:first-child]:border-l-copper')}
          >
            <RowHead className={cx(size.needsOverride && 'text-ink-soft')}>
              {sizeText(size)} {size.now && <span className="text-label font-normal text-ink-soft">now</span>}
            </RowHead>
            <Td
              numeric
              label="Ampacity"
              title={size.floor.reasons.join('; ') || size.floor.basis || undefined}
            >
              <span className={cx(size.needsOverride && 'text-over')}>{ampacityText(size)}</span>
            </Td>
            <Td numeric label="Drop">
              {size.dropPercent === null ? '' : `${formatFixed(size.dropPercent, 2)} %`}
            </Td>
            <Td numeric label={feeder ? 'Feeder, worst panel' : 'Total, worst load'}>
              <Decides size={size} feeder={feeder} />
            </Td>
            <Td label="Verdict beyond">
              <Verdict kind={shownVerdict(size)} />
            </Td>
            <Td numeric label="Over beyond">
              {size.overBeyond}
            </Td>
            <Td numeric label="Passes to">
              {passesTo(size, lengthUnit)}
            </Td>
            <Td numeric label="Loss">
              {size.lossWatts === null ? '' : formatWatts(size.lossWatts)}
            </Td>
            <Td numeric label="Grounding" title={size.grounding.ok ? undefined : size.grounding.reason}>
              {groundingText(size)}
            </Td>
            <Td className="text-right">
              {!size.now && !readOnly && <UseSizeButton run={run} size={size} look="plain" />}
            </Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function Decides({ size, feeder }: { size: SizeFigures; feeder: boolean }) {
  const panel = Math.max(...size.panels.map(({ feederPercent }) => feederPercent));
  if (feeder && size.panels.length > 0)
    return (
      <span className={cx(size.feederVerdict === 'over' && 'font-bold text-over')}>
        {formatFixed(panel, 2)} %
      </span>
    );
  if (!size.worst) return null;
  const { totalPercent, limitPercent } = size.worst;
  const over = limitPercent !== null && totalPercent > limitPercent;
  return (
    <span className={cx(over && 'font-bold text-over')}>
      {formatFixed(totalPercent, digitsAgainst(totalPercent, limitPercent))} %
    </span>
  );
}
