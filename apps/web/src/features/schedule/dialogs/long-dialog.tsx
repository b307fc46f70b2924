import { type ReactNode, useState } from 'react';
import { Button } from '../../../ui/button.tsx';
import { Dialog } from '../../../ui/dialog.tsx';

interface LongDialogProps {
  title: string;
  description?: ReactNode;
  /** Whether something was typed that is not written yet. */
  changed: boolean;
  onClose: () => void;
  children: ReactNode;
}

/** A dialog of many fields: Esc and a click beside it ask first when something was typed. */
export function LongDialog({ title, description, changed, onClose, children }: LongDialogProps) {
  const [asking, setAsking] = useState(false);
  const leave = () => (changed ? setAsking(true) : onClose());
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => !open && leave()}
      title={title}
      description={description}
      actions={
        asking && (
          <div role="alert" className="flex flex-wrap items-center gap-3">
            <p className="text-grid">What you typed is not written yet.</p>
            <Button onClick={() => setAsking(false)}>Go on typing</Button>
            <Button look="danger" onClick={onClose}>
              Let it go
            </Button>
          </div>
        )
      }
    >
      {children}
    </Dialog>
  );
}
