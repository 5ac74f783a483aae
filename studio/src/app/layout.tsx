import { lazy, Suspense } from 'react';
import { Outlet, ScrollRestoration } from 'react-router-dom';
import { Toasts } from '../components/toasts.tsx';
import { useSessionEnd } from '../lib/api/session-end.ts';
import { useMe } from '../lib/session/use-me.ts';
import { TopBar } from './top-bar.tsx';

const SessionEndDialog = lazy(async () => ({ default: (await import('./session-end-dialog.tsx')).SessionEndDialog }));

/** The head every page stands under, and what may appear over or under any page. */
export function Layout() {
  const { data: me } = useMe();
  const hasEnded = useSessionEnd();
  return (
    <>
      <a className="btn skip" href="#main">
        To the content
      </a>
      <TopBar me={me} />
      <main id="main" tabIndex={-1} className="outline-none">
        <Outlet />
      </main>
      <div className="bottom-edge">
        <Toasts />
        {me && hasEnded && (
          <Suspense fallback={null}>
            <SessionEndDialog person={me.person} />
          </Suspense>
        )}
      </div>
      <ScrollRestoration />
    </>
  );
}
