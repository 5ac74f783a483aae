import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, render, screen, waitFor } from '@testing-library/react';
import { createMemoryRouter, Outlet, RouterProvider } from 'react-router-dom';
import { expect, test } from 'vitest';
import type { Me } from '../../../server/src/contract/account.ts';
import { SignInPage } from '../features/sign-in/sign-in-page.tsx';
import { setMe } from '../lib/session/me-query.ts';
import { useWorkspace } from '../lib/session/use-workspace.ts';
import { SignedIn } from './signed-in.tsx';
import { WorkspaceFrame } from './workspace-frame.tsx';

const me: Me = {
  person: { id: 'p', email: 'ines.quispe@puna.example', name: 'Inés Quispe', hasPassword: true },
  workspaces: [{ workspaceId: 'puna', workspaceName: 'Puna Mobility', role: 'analyst' }],
};

function Page() {
  const { workspaceName, role, may } = useWorkspace();
  return (
    <p>
      {workspaceName}, {role}, {may('edit-studies') ? 'edits studies' : 'reads'},{' '}
      {may('manage') ? 'manages' : 'manages nothing'}
    </p>
  );
}

function openAt(address: string) {
  const client = new QueryClient({ defaultOptions: { queries: { staleTime: Infinity, retry: false } } });
  // No way but by password: what the server offers is not asked here.
  client.setQueryData(['sign-in-options'], { provider: null, mailboxUrl: null });
  const frame = {
    path: '/w/:workspaceId',
    element: <WorkspaceFrame />,
    children: [{ path: 'team', element: <Page /> }],
  };
  const router = createMemoryRouter(
    [
      {
        element: <Outlet />,
        children: [
          { path: '/sign-in', element: <SignInPage /> },
          { element: <SignedIn />, children: [frame] },
        ],
      },
    ],
    { initialEntries: [address] },
  );
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return { client, place: () => Object.values(pick(router.state.location)).join('') };
}

const pick = ({ pathname, search, hash }: { pathname: string; search: string; hash: string }) => ({
  pathname,
  search,
  hash,
});

test('SignedIn sends a guest to sign in and brings them back to the whole address', async () => {
  const { client, place } = openAt('/w/puna/team?sort=role#invitations');
  await screen.findByRole('heading', { name: 'Sign in' });
  expect(place()).toBe(`/sign-in?to=${encodeURIComponent('/w/puna/team?sort=role#invitations')}`);
  act(() => setMe(client, me));
  await screen.findByText('Puna Mobility, analyst, edits studies, manages nothing');
  expect(place()).toBe('/w/puna/team?sort=role#invitations');
});

test('a signed-in person who opens the sign-in page goes on to their workspace', async () => {
  const { client, place } = openAt('/sign-in');
  act(() => setMe(client, me));
  await waitFor(() => expect(place()).toBe('/w/puna'));
});
