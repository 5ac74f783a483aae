import { useMutation, useQueryClient, type InfiniteData } from '@tanstack/react-query';
import { studyEndpoints } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { withRowMoved } from '../model/moved-row.ts';
import { listKey, type ListQuery, type StudyPage } from './list-studies.ts';
import { studiesKey } from './studies-key.ts';

export type Move = { studyId: string; toArchive: boolean };

/** Puts a study into the archive or takes it out. The row goes at once, and comes back where the server refuses. */
export function useMoveStudy(workspaceId: string) {
  const client = useQueryClient();
  const lists = { queryKey: listKey(workspaceId) };
  return useMutation({
    mutationFn: ({ studyId, toArchive }: Move) =>
      callApi(toArchive ? studyEndpoints.archiveStudy : studyEndpoints.unarchiveStudy, {
        params: { workspaceId, studyId },
      }),
    onMutate: async (move) => {
      await client.cancelQueries(lists);
      const before = client.getQueriesData<InfiniteData<StudyPage, string | null>>(lists);
      for (const [key, list] of before)
        if (list) client.setQueryData(key, withRowMoved(list, key.at(-1) as ListQuery, move));
      return before;
    },
    onError: (_error, _move, before) => before?.forEach(([key, list]) => client.setQueryData(key, list)),
    onSettled: () => client.invalidateQueries({ queryKey: studiesKey(workspaceId) }),
  });
}
