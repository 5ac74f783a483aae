import { useMutation, useQueryClient } from '@tanstack/react-query';
import { accountEndpoints } from '../../../../../server/src/contract/account.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { meQuery } from '../../../lib/session/me-query.ts';

/** Changes the own name. */
export function useRenameMe() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { name: string }) => callApi(accountEndpoints.renameMe, { body }),
    onSuccess: (person) => client.setQueryData(meQuery.queryKey, (me) => me && { ...me, person }),
  });
}
