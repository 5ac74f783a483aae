import { infiniteQueryOptions } from '@tanstack/react-query';
import { workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import type { StudyPlace } from './study-query.ts';

const DEEDS_A_PAGE = 20;

/** Who did what to a study, newest first, page by page. */
export function studyActivityQuery({ workspaceId, studyId }: StudyPlace) {
  return infiniteQueryOptions({
    queryKey: ['studies', workspaceId, studyId, 'activity'],
    initialPageParam: undefined as string | undefined,
    queryFn: ({ signal, pageParam }) =>
      callApi(workspaceEndpoints.listActivity, {
        params: { workspaceId },
        query: { subjectId: studyId, limit: DEEDS_A_PAGE, ...(pageParam === undefined ? {} : { cursor: pageParam }) },
        signal,
      }),
    getNextPageParam: (page) => page.nextCursor ?? undefined,
    // Archiving, copying and revising add to it, here and elsewhere.
    staleTime: 0,
  });
}
