import type { JobRows } from '@farlug/contract/rows';
import {
  addTapEdit,
  assumeLoadEdit,
  assumeStartingEdit,
  type CircuitView,
  closeRingEdit,
  makeMultiwireEdit,
  removeLastSegmentEdit,
  type ScheduleChange,
  splitMultiwireEdit,
  spreadLoadEdit,
} from '@farlug/contract/schedule';
import { useState } from 'react';
import { Menu, type MenuItem } from '../../../ui/menu.tsx';
import { Message } from '../../../ui/message.tsx';

interface WiringMenuProps {
  rows: JobRows;
  circuit: CircuitView;
  onApply: (change: ScheduleChange) => string | null;
}

/** Other ways to wire a branch circuit, and values that common practice proposes where nobody stated them. */
export function WiringMenu({ rows, circuit, onApply }: WiringMenuProps) {
  const [refused, setRefused] = useState<string | null>(null);
  if (circuit.circuit.kind !== 'branch') return null;
  const { id, form } = circuit;
  const item = (label: string, change: () => ScheduleChange): MenuItem => ({
    label,
    onSelect: () => setRefused(onApply(change())),
  });
  const items = [
    item('Add a tap: another load further on', () => addTapEdit(rows, id)),
    ...(circuit.runs.length > 1
      ? [item('Take the last segment away', () => removeLastSegmentEdit(rows, id))]
      : []),
    form === 'spread'
      ? item('Gather the load at the end', () => spreadLoadEdit(rows, id, false))
      : item('Spread the load along the run', () => spreadLoadEdit(rows, id, true)),
    ...(form === 'ring' ? [] : [item('Close a ring back to the panel', () => closeRingEdit(rows, id))]),
    ...(form === 'multiwire'
      ? [item('Part its legs beyond the last point', () => splitMultiwireEdit(rows, id))]
      : [
          item('Share its neutral with the next pole', () => makeMultiwireEdit(rows, id, 2)),
          item('Share its neutral with the next two poles', () => makeMultiwireEdit(rows, id, 3)),
        ]),
    item('Assume 80 % of the breaker as the load', () => assumeLoadEdit(rows, id)),
    item('Assume the starting current', () => assumeStartingEdit(rows, id)),
  ];
  return (
    <>
      <Menu label="Wire it otherwise" items={items} />
      {refused && (
        <Message kind="wrong" className="order-last w-full">
          {refused}
        </Message>
      )}
    </>
  );
}
