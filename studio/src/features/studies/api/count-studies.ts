import { useQuery } from '@tanstack/react-query';
import { studyEndpoints } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { studiesKey } from './studies-key.ts';

/** How many studies the workspace has outside the archive, in it, and waiting for a review. */
export function useStudyCounts(workspaceId: string) {
  return useQuery({
    queryKey: [...studiesKey(workspaceId), 'counts'],
    queryFn: ({ signal }) =>
      callApi(studyEndpoints.listStudies, { params: { workspaceId }, query: { limit: 1 }, signal }),
    staleTime: 0,
    select: ({ total, archivedTotal, inReviewTotal }) => ({ total, archivedTotal, inReviewTotal }),
  });
}
