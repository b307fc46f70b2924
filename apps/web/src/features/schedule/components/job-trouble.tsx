import { Link } from 'react-router-dom';
import type { SolverSnapshot } from '../../../job/solver-client.ts';
import { Message } from '../../../ui/message.tsx';
import type { Trouble } from '../../../workers/results.ts';

interface JobTroubleProps {
  snapshot: SolverSnapshot;
  /** The address of what a trouble is about; null where it has no place of its own. */
  to: (at: NonNullable<Trouble['at']>) => string | null;
}

/** Why there are no figures, with the way to the row that it is about. */
export function JobTrouble({ snapshot, to }: JobTroubleProps) {
  if (snapshot.fault)
    return (
      <Message kind="wrong">
        The solver stopped: {snapshot.fault}. Nothing that was typed is lost; reload the page to go on.
      </Message>
    );
  if (snapshot.result?.state !== 'stopped') return null;
  return (
    <Message kind="wrong">
      <p>No figures can be computed.</p>
      <ul>
        {snapshot.result.trouble.map((trouble) => {
          const address = trouble.at && to(trouble.at);
          return (
            <li key={trouble.text}>
              {trouble.text} {address && <Link to={address}>Show it</Link>}
            </li>
          );
        })}
      </ul>
    </Message>
  );
}
