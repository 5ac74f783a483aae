import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { SentBodyOf } from '../../../../../server/src/contract/endpoint.ts';
import { studyEndpoints } from '../../../../../server/src/contract/study.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { studiesKey } from './studies-key.ts';

export type NewStudy = SentBodyOf<typeof studyEndpoints.createStudy> & {
  /** The same for the same wish: sent again after a lost answer, it makes no second study. */
  key: string;
};

/** Makes a study with its first revision. */
export function useCreateStudy(workspaceId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ key, ...body }: NewStudy) =>
      callApi(studyEndpoints.createStudy, { params: { workspaceId }, body, idempotencyKey: key }),
    onSuccess: () => client.invalidateQueries({ queryKey: studiesKey(workspaceId) }),
  });
}
