import { useEffect } from 'react';
import { useBlocker } from 'react-router-dom';
import { Button } from './button.tsx';
import { Dialog } from './dialog.tsx';

/** Asks before something typed and not saved is left behind. */
export function LeaveGuard({ when }: { when: boolean }) {
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) => when && currentLocation.pathname !== nextLocation.pathname,
  );
  useEffect(() => {
    if (!when) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [when]);
  return (
    <Dialog
      open={blocker.state === 'blocked'}
      onOpenChange={(open) => !open && blocker.reset?.()}
      title="Leave without saving?"
      description="What you changed on this page is not saved yet."
      actions={
        <>
          <Button big onClick={() => blocker.reset?.()}>
            Stay here
          </Button>
          <Button big look="danger" onClick={() => blocker.proceed?.()}>
            Leave it
          </Button>
        </>
      }
    />
  );
}
