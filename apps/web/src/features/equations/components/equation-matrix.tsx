import { complexText, type Equations } from '@farlug/solver/equations';
import { RowHead, Table, Td, Th } from '../../../ui/table.tsx';

/** Y·V = J of the nodes whose voltage is not given; what joins other nodes stands at the right, at their voltages. */
export function EquationMatrix({ equations: { matrix, solution } }: { equations: Equations }) {
  return (
    <div className="px-4 py-2">
      <Table caption="Y·V = J, siemens, volts and amperes" showCaption>
        <thead>
          <tr>
            <Th>Node</Th>
            {matrix.nodes.map((node) => (
              <Th key={node} numeric>
                V({node})
              </Th>
            ))}
            <Th numeric>J</Th>
            <Th numeric>Solution, V</Th>
          </tr>
        </thead>
        <tbody>
          {matrix.nodes.map((node, r) => (
            <tr key={node}>
              <RowHead>{node}</RowHead>
              {matrix.y[r]!.map((y, c) => (
                <Td key={matrix.nodes[c]} numeric className="font-code text-label">
                  {complexText(y)}
                </Td>
              ))}
              <Td numeric className="font-code text-label">
                {complexText(matrix.right[r]!)}
              </Td>
              <Td numeric className="font-code text-label">
                {complexText(solution[r]!)}
              </Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </div>
  );
}
