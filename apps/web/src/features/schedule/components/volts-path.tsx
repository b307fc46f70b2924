import { formatFixed } from '@farlug/solver/units';
import { cx } from '../../../ui/cx.ts';
import { type DropPart, DropStrip } from '../../../ui/drop-strip.tsx';
import { Table, Td, Th } from '../../../ui/table.tsx';
import type { LoadFigures } from '../../../workers/results.ts';

interface VoltsPathProps {
  load: LoadFigures;
  counted: { source: boolean; service: boolean; transformer: boolean };
}

const SWATCH = { aside: 'hatch', feeder: 'bg-mid', branch: 'bg-deep' } as const;

/** Where the volts go, service to far lug: the picture, then the same as a table. */
export function VoltsPath({ load, counted }: VoltsPathProps) {
  const { volts, dropVolts, dropPercent, limitPercent, totalPercent } = load;
  if (volts === null || dropVolts === null || !dropPercent || totalPercent === null) return null;
  const perPercent = dropVolts / dropPercent;
  const split = [
    { key: 'Source', percent: load.sourcePercent!, part: counted.source ? 'feeder' : 'aside' },
    { key: 'Service', percent: load.servicePercent!, part: counted.service ? 'feeder' : 'aside' },
    { key: 'Transformer', percent: load.transformerPercent!, part: counted.transformer ? 'feeder' : 'aside' },
    { key: 'Feeder', percent: load.feederPercent!, part: 'feeder' },
    { key: 'Branch', percent: load.branchPercent!, part: 'branch' },
  ] as const;
  const shown = split.filter(
    ({ key, percent }) => key === 'Feeder' || key === 'Branch' || Math.abs(percent) > 1e-9,
  );
  const order = { aside: 0, feeder: 1, branch: 2 };
  const parts: DropPart[] = [...shown]
    .sort((a, b) => order[a.part] - order[b.part])
    .map(({ key, percent, part }) => ({ label: key, volts: percent * perPercent, part }));
  const limitVolts = limitPercent === null ? null : limitPercent * perPercent;
  return (
    <>
      <DropStrip
        parts={parts}
        limitVolts={limitVolts}
        limitLabel={
          limitVolts === null ? 'no limit set' : `limit ${limitPercent} %: ${formatFixed(limitVolts, 2)} V`
        }
      />
      <Table caption="Where the volts go">
        <thead className="sr-only">
          <tr>
            <Th>Part</Th>
            <Th numeric>Volts</Th>
            <Th numeric>Percent</Th>
          </tr>
        </thead>
        <tbody>
          {shown.map(({ key, percent, part }) => (
            <tr key={key}>
              <Td className="pl-0!">
                <span aria-hidden="true" className={cx('mr-2 inline-block size-2.5', SWATCH[part])} />
                {key}
                {part === 'aside' && <span className="text-label text-ink-soft"> not counted</span>}
              </Td>
              <Td numeric>{formatFixed(percent * perPercent, 2)} V</Td>
              <Td numeric className="pr-0!">
                {formatFixed(percent, 2)} %
              </Td>
            </tr>
          ))}
          <tr className="font-bold">
            <Td className="pl-0!">Counted</Td>
            <Td numeric>{formatFixed(totalPercent * perPercent, 2)} V</Td>
            <Td numeric className="pr-0!">
              {formatFixed(totalPercent, 2)} %
            </Td>
          </tr>
        </tbody>
      </Table>
    </>
  );
}
