import { formatCount } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import { type MissingCircuit, nextMissing } from '../next-missing.ts';

interface NextMissingLinkProps {
  missing: readonly MissingCircuit[];
  chosenId: string | null;
  panelId: string | null;
  onJump: (to: MissingCircuit) => void;
}

/** What is to be done next: how much is missing, and the way to the next cell. */
export function NextMissingLink({ missing, chosenId, panelId, onJump }: NextMissingLinkProps) {
  const next = nextMissing(missing, chosenId, panelId);
  if (!next) return null;
  const lengths = missing.filter(({ circuit }) => circuit.next?.field === 'length').length;
  const rest = missing.length - lengths;
  const count = [
    lengths > 0 && `${formatCount(lengths, 'length')} missing`,
    rest > 0 && `${formatCount(rest, 'row')} to fill in`,
  ].filter(Boolean);
  return (
    <Button look="bare" onClick={() => onJump(next)}>
      {count.join(', ')}, next {next.circuit.code}
    </Button>
  );
}
