import { formatFixed, formatPercent } from '@farlug/solver/units';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { VerdictFigure } from '../../../ui/verdict.tsx';
import type { LoadFigures } from '../../../workers/results.ts';

export function LoadsTable({ loads }: { loads: readonly LoadFigures[] }) {
  return (
    <Table caption="Loads of the circuit">
      <thead>
        <tr>
          <Th className="pl-0!">Load</Th>
          <Th numeric>Volts</Th>
          <Th numeric className="pr-0!">
            Total
          </Th>
        </tr>
      </thead>
      <tbody>
        {loads.map((load) => (
          <tr key={load.row}>
            <RowHead className="pl-0! font-normal">
              {load.id} <span className="text-label text-ink-soft">{load.terminals}</span>
            </RowHead>
            <Td numeric>{load.volts === null ? '' : `${formatFixed(load.volts, 1)} V`}</Td>
            <Td numeric className="pr-0!">
              <VerdictFigure kind={load.shown}>
                {load.totalPercent === null ? '' : formatPercent(load.totalPercent)}
              </VerdictFigure>
            </Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
