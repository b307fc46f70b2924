import { complexText, type NodeEquation } from '@farlug/solver/equations';

interface EquationListProps {
  equations: readonly NodeEquation[];
  form: 'numbers' | 'names';
}

/** One equation after the other, each with its solution and what is left over at the node. */
export function EquationList({ equations, form }: EquationListProps) {
  return (
    <ol className="px-4 py-2">
      {equations.map((equation) => (
        <li key={equation.node} className="border-b border-hair py-2">
          <h2 className="text-grid font-bold">
            {equation.node}
            {equation.also.length > 0 && (
              <span className="font-normal text-ink-soft"> the same as {equation.also.join(', ')}</span>
            )}
          </h2>
          <p className="font-code text-label [overflow-wrap:anywhere]">
            {form === 'numbers' ? equation.text : equation.symbols}
          </p>
          {!equation.given && (
            <p className="text-label text-ink-soft">
              Solved: V({equation.node}) = <b className="text-ink">{complexText(equation.volts)} V</b>; left
              over {equation.kclAmps === 0 ? '0' : equation.kclAmps.toExponential(1)} A
            </p>
          )}
        </li>
      ))}
    </ol>
  );
}
