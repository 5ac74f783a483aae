import { queryOptions, type QueryClient } from '@tanstack/react-query';
import { studyEndpoints, type Study, type WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';

/** Which study of which workspace a call is about. */
export type StudyPlace = { workspaceId: string; studyId: string };

/** One study with its working copy. */
export function studyQuery(place: StudyPlace) {
  return queryOptions({
    queryKey: ['studies', place.workspaceId, place.studyId],
    queryFn: ({ signal }): Promise<Study> => callApi(studyEndpoints.readStudy, { params: place, signal }),
    // Whoever comes back to the tab sees what others did meanwhile.
    refetchOnWindowFocus: 'always',
  });
}

/** Puts a study that a call answered with in the place of the one that is known. */
export async function setStudy(client: QueryClient, place: StudyPlace, study: Study): Promise<void> {
  const { queryKey } = studyQuery(place);
  // An older answer still under way must not overwrite it.
  await client.cancelQueries({ queryKey });
  client.setQueryData(queryKey, study);
}

/** The same for a working copy alone. */
export async function setWorkingCopy(client: QueryClient, place: StudyPlace, working: WorkingCopy): Promise<void> {
  const { queryKey } = studyQuery(place);
  await client.cancelQueries({ queryKey });
  client.setQueryData<Study>(queryKey, (study) =>
    study && working.version >= study.working.version
      ? {
          ...study,
          working,
          title: working.inputs.title ?? '',
          isChanged: working.isChanged,
          changedAt: working.changedAt,
          changedBy: working.changedBy,
        }
      : study,
  );
}
