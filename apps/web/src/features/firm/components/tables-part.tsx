import { tableSources } from '@farlug/solver/tables';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';
import { PartHeading } from './part-heading.tsx';

export function TablesPart() {
  return (
    <>
      <PartHeading
        title="Tables"
        note="What the results stand on. Confirm them against the edition that is adopted where you work."
      />
      <Table stacked caption="Tables with source and edition">
        <thead>
          <tr>
            <Th>Table</Th>
            <Th>Source and edition</Th>
            <Th>How it was seen</Th>
            <Th>Note</Th>
          </tr>
        </thead>
        <tbody>
          {tableSources().map((table) => (
            <tr key={table.id}>
              <RowHead className="min-w-52">{table.title}</RowHead>
              <Td label="Source and edition" className="min-w-52">
                {table.source}
              </Td>
              <Td label="How it was seen" className="min-w-40">
                {table.verified}
              </Td>
              <Td label="Note" className="min-w-64 text-ink-soft">
                {table.note}
              </Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </>
  );
}
