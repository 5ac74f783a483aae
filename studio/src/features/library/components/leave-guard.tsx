import { useEffect } from 'react';
import { useBlocker } from 'react-router-dom';
import { ConfirmDialog } from '../../../components/confirm.tsx';

/** Asks before a page is left on which changes are no revision yet. They stay in this browser all the same. */
export function LeaveGuard({ isChanged }: { isChanged: boolean }) {
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) => isChanged && currentLocation.pathname !== nextLocation.pathname,
  );
  // Speaks to the browser, which asks in its own words.
  useEffect(() => {
    if (!isChanged) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [isChanged]);
  return (
    <ConfirmDialog
      title="Leave with changes that are no revision yet?"
      about="They stay in this browser until you come back to save or discard them. Nobody else sees them."
      open={blocker.state === 'blocked'}
      onOpenChange={(open) => !open && blocker.state === 'blocked' && blocker.reset()}
      confirm="Leave"
      busy="Leaving"
      cancel="Stay"
      onConfirm={() => {
        blocker.proceed?.();
        return Promise.resolve();
      }}
    />
  );
}
