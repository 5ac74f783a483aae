import { lazy, Suspense, useState } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import { Button } from '../../../components/button.tsx';
import { signInPath } from '../../../lib/session/sign-in-path.ts';
import { useMe } from '../../../lib/session/use-me.ts';

// A guest never waits for it.
const KeepDialog = lazy(async () => ({ default: (await import('./keep-dialog.tsx')).KeepDialog }));

/** Carries what is on a guest's desk into an account; who has none, or is not signed in, comes back to it. */
export function KeepAction() {
  const { data: me } = useMe();
  const [search, setSearch] = useSearchParams();
  const isAsked = search.has('keep');
  const [isOpen, setOpen] = useState(isAsked);
  const onOpenChange = (open: boolean) => {
    setOpen(open);
    if (!open && isAsked) setSearch({}, { replace: true, preventScrollReset: true });
  };
  if (!me) {
    return (
      <Button asChild>
        <Link to={signInPath({ pathname: '/try', search: '?keep', hash: '' })}>Keep this</Link>
      </Button>
    );
  }
  return (
    <>
      <Button onClick={() => setOpen(true)}>Keep this</Button>
      {isOpen && (
        <Suspense fallback={null}>
          <KeepDialog me={me} onOpenChange={onOpenChange} />
        </Suspense>
      )}
    </>
  );
}
