import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { Person } from '../../../server/src/contract/account.ts';
import { Dialog } from '../components/dialog.tsx';
import { ProviderButton } from '../features/sign-in/components/provider-button.tsx';
import { SignInForm } from '../features/sign-in/components/sign-in-form.tsx';
import { meQuery } from '../lib/session/me-query.ts';

/**
 * Signing in again over the page, which keeps all that was typed. A sign-in in another tab is noticed when this one is
 * looked at again: who is signed in is then asked anew.
 */
export function SessionEndDialog({ person }: { person: Person }) {
  const [isPutOff, setPutOff] = useState(false);
  useQuery({ ...meQuery, refetchOnWindowFocus: 'always' });
  if (isPutOff) {
    return (
      <div className="toast stop" role="status">
        <p>Signed out on this device: nothing is kept on the server until you sign in again.</p>
        <button className="lnk" onClick={() => setPutOff(false)}>
          Sign in
        </button>
      </div>
    );
  }
  return (
    <Dialog
      title="Signed out on this device"
      about={`Sign in as ${person.name} to go on. What you typed on this page is still here.`}
      open
      onOpenChange={() => setPutOff(true)}
    >
      {person.hasPassword && <SignInForm email={person.email} />}
      <div className="form-actions mt-[16px]">
        <ProviderButton next="/" isApart />
        <Link className="lnk" to="/sign-in" reloadDocument>
          Leave this page and sign in as another person
        </Link>
      </div>
    </Dialog>
  );
}
