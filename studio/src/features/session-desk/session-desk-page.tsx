import '../../lib/zod-without-eval.ts';
import './session-desk.css';
import { useEffect, useState } from 'react';
import { PageTitle } from '../../components/page-title.tsx';
import { SessionDesk } from './components/session-desk.tsx';
import { loadDesk, type LoadedDesk } from './hooks/load-desk.ts';

/** The session desk, without an account: inputs on one side, results on the other, everything kept in this browser. */
export function SessionDeskPage() {
  const [loaded, setLoaded] = useState<LoadedDesk | null>(null);
  const [error, setError] = useState<unknown>(null);
  // Speaks to this browser's storage and the page's address.
  useEffect(() => {
    let gone = false;
    loadDesk().then(
      (desk) => !gone && setLoaded(desk),
      (reason: unknown) => !gone && setError(reason),
    );
    return () => {
      gone = true;
    };
  }, []);
  // The router shows what went wrong and how to go on.
  if (error) throw error instanceof Error ? error : new Error('The desk could not be opened');
  return (
    <>
      <PageTitle page="Session desk" />
      {loaded ? <SessionDesk {...loaded} /> : <p className="desk-opening">Opening the desk.</p>}
    </>
  );
}
