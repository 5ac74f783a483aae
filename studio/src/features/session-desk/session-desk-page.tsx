import '../../lib/zod-without-eval.ts';
import './session-desk.css';
import { useEffect, useState } from 'react';
import { PageTitle } from '../../components/page-title.tsx';
import { DeskActions } from './components/desk-actions.tsx';
import { DeskTitleBlock } from './components/desk-title-block.tsx';
import { SessionDesk, type HeadTools } from './components/session-desk.tsx';
import { loadDesk, type LoadedDesk } from './hooks/load-desk.ts';

const guestHead = (tools: HeadTools) => <DeskTitleBlock actions={<DeskActions {...tools} />} />;

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
      {loaded ? <SessionDesk {...loaded} head={guestHead} /> : <p className="desk-opening">Opening the desk.</p>}
    </>
  );
}
