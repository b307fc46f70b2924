import { complexText, type Named } from '@farlug/solver/equations';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';

/** What the letters of the equations stand for. */
export function NamedTable({
  caption,
  items,
  unit,
}: {
  caption: string;
  items: readonly Named[];
  unit: string;
}) {
  if (items.length === 0) return null;
  return (
    <details className="border-t border-rule px-4 py-2">
      <summary className="tap content-center text-grid text-copper">
        {caption}: {items.length}
      </summary>
      <Table caption={caption}>
        <thead>
          <tr>
            <Th>Name</Th>
            <Th numeric>Value, {unit}</Th>
            <Th>Of</Th>
          </tr>
        </thead>
        <tbody>
          {items.map(({ name, value, about }) => (
            <tr key={name}>
              <RowHead className="font-code font-normal">{name}</RowHead>
              <Td numeric className="font-code">
                {complexText(value)}
              </Td>
              <Td>{about}</Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </details>
  );
}
