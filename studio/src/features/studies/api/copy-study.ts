import { useMutation, useQueryClient } from '@tanstack/react-query';
import { studyEndpoints } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { studiesKey } from './studies-key.ts';

/** Copies the newest revision of a study; the copy is the caller's own. */
export function useCopyStudy(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (studyId: string) =>
      callApi(studyEndpoints.copyStudy, {
        params: { workspaceId, studyId },
        body: {},
        idempotencyKey: crypto.randomUUID(),
      }),
    onSuccess: () => client.invalidateQueries({ queryKey: studiesKey(workspaceId) }),
  });
}
