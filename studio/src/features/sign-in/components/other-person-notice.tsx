import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '../../../components/button.tsx';
import { Notice } from '../../../components/notice.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { setSignedOut } from '../../../lib/session/me-query.ts';
import { signOutHere } from '../../../lib/session/sign-out.ts';

/** The invitation is for somebody else than who is signed in. */
export function OtherPersonNotice({ invited, own }: { invited: string; own: string }) {
  const client = useQueryClient();
  const [problem, setProblem] = useState<string | null>(null);
  const signOut = async () => {
    try {
      await signOutHere();
      setSignedOut(client);
    } catch (error) {
      setProblem(problemSentence(error));
    }
  };
  return (
    <>
      <Notice kind="stop">
        This invitation is for {invited}, but you are signed in as {own}. Sign out and join as {invited}, or ask for an
        invitation to {own}.
      </Notice>
      {problem && <Notice kind="stop">{problem}</Notice>}
      <Button onClick={() => void signOut()}>Sign out on this device</Button>
    </>
  );
}
