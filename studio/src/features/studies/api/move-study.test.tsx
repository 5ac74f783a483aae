import { QueryClient, QueryClientProvider, type InfiniteData } from '@tanstack/react-query';
import { act, renderHook, waitFor } from '@testing-library/react';
import type { ReactNode } from 'react';
import { afterEach, expect, test, vi } from 'vitest';
import { listKey, type StudyPage } from './list-studies.ts';
import { useMoveStudy } from './move-study.ts';

afterEach(() => vi.unstubAllGlobals());

const key = [...listKey('w'), { archived: 'no' }];
const rows = ['a', 'b'].map((id) => ({ id, state: 'draft' }) as StudyPage['items'][number]);
const before: InfiniteData<StudyPage> = {
  pages: [{ items: rows, nextCursor: null, total: 2, archivedTotal: 0, inReviewTotal: 0 }],
  pageParams: [null],
};

/** The network, answering when it is told to. */
function heldAnswer() {
  let answer: (response: Response) => void = () => undefined;
  vi.stubGlobal(
    'fetch',
    vi.fn(() => new Promise<Response>((resolve) => (answer = resolve))),
  );
  return (status: number, body: object) =>
    answer(new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } }));
}

function setUp() {
  const client = new QueryClient();
  client.setQueryData(key, before);
  const wrapper = ({ children }: { children: ReactNode }) => (
    <QueryClientProvider client={client}>{children}</QueryClientProvider>
  );
  const { result } = renderHook(() => useMoveStudy('w'), { wrapper });
  const shown = () => client.getQueryData<typeof before>(key)!.pages.flatMap(({ items }) => items.map(({ id }) => id));
  return { client, result, shown };
}

test('the row goes at once, before the server has answered', async () => {
  const answer = heldAnswer();
  const { result, shown } = setUp();
  act(() => result.current.mutate({ studyId: 'a', toArchive: true }));
  await waitFor(() => expect(shown()).toEqual(['b']));
  act(() => answer(200, {}));
  await waitFor(() => expect(result.current.isSuccess).toBe(true));
  expect(shown()).toEqual(['b']);
  expect(vi.mocked(fetch).mock.calls[0]![0]).toBe('/api/v1/workspaces/w/studies/a/archive');
});

test('the row comes back, with its counts, where the server refuses', async () => {
  const answer = heldAnswer();
  const { client, result, shown } = setUp();
  act(() => result.current.mutate({ studyId: 'a', toArchive: true }));
  await waitFor(() => expect(shown()).toEqual(['b']));
  act(() => answer(403, { code: 'FORBIDDEN', status: 403, detail: 'A viewer may not do this.' }));
  await waitFor(() => expect(result.current.isError).toBe(true));
  expect(client.getQueryData(key)).toEqual(before);
});
