import { useState } from 'react';
import { Button } from '../../../ui/button.tsx';
import { Message } from '../../../ui/message.tsx';

interface DeleteOrLeaveProps {
  /** What can be deleted; null where there is nothing yet. */
  what: string | null;
  /** What deleting it leaves behind. */
  goes: string;
  onLeave: () => void;
  /** What was wrong; null where it is gone. */
  onDelete: () => string | null;
}

/** The way back of a dialog, and the deletion, which is asked for twice. */
export function DeleteOrLeave({ what, goes, onLeave, onDelete }: DeleteOrLeaveProps) {
  const [asked, setAsked] = useState(false);
  const [refused, setRefused] = useState<string | null>(null);
  return (
    <>
      <Button big onClick={onLeave}>
        Leave it
      </Button>
      {what && !asked && (
        <Button big look="danger" className="desk:ml-auto" onClick={() => setAsked(true)}>
          Delete …
        </Button>
      )}
      {what && asked && (
        <div className="flex basis-full flex-wrap items-center gap-3 border-t border-rule pt-3">
          <p className="text-grid">
            Delete {what}? {goes}
          </p>
          <Button look="danger" onClick={() => setRefused(onDelete())}>
            Delete {what}
          </Button>
          <Button onClick={() => setAsked(false)}>Keep it</Button>
          {refused && <Message kind="wrong">{refused}</Message>}
        </div>
      )}
    </>
  );
}
