import { infiniteQueryOptions, queryOptions } from '@tanstack/react-query';
import { studyEndpoints } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import type { StudyPlace } from './study-query.ts';

/** Revisions of a study, newest first, page by page. */
export function revisionsQuery(place: StudyPlace) {
  return infiniteQueryOptions({
    queryKey: ['studies', place.workspaceId, place.studyId, 'revisions'],
    initialPageParam: undefined as string | undefined,
    queryFn: ({ signal, pageParam }) =>
      callApi(studyEndpoints.listStudyRevisions, {
        params: place,
        query: pageParam === undefined ? {} : { cursor: pageParam },
        signal,
      }),
    getNextPageParam: (page) => page.nextCursor ?? undefined,
  });
}

/** One revision, whole. Its inputs never change. */
export function revisionQuery(place: StudyPlace, revision: number) {
  return queryOptions({
    queryKey: ['studies', place.workspaceId, place.studyId, 'revision', revision],
    queryFn: ({ signal }) => callApi(studyEndpoints.readStudyRevision, { params: { ...place, revision }, signal }),
    staleTime: Infinity,
  });
}
