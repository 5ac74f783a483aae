import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { Role } from '../../../../../server/src/contract/roles.ts';
import { type Member, workspaceEndpoints } from '../../../../../server/src/contract/workspace.ts';
import { callApi } from '../../../lib/api/call-api.ts';
import { meQuery } from '../../../lib/session/me-query.ts';
import { membersKey } from '../../../lib/api/members-key.ts';

type Members = { items: Member[] };

/** Gives a member another role: shown at once, taken back if the server refuses. */
export function useChangeRole(workspaceId: string) {
  const client = useQueryClient();
  const queryKey = membersKey(workspaceId);
  return useMutation({
    mutationFn: ({ personId, role }: { personId: string; role: Role }) =>
      callApi(workspaceEndpoints.changeRole, { params: { workspaceId, personId }, body: { role } }),
    onMutate: async ({ personId, role }) => {
      await client.cancelQueries({ queryKey });
      const before = client.getQueryData<Members>(queryKey);
      client.setQueryData<Members>(queryKey, (known) => known && withRole(known, personId, role));
      return { before };
    },
    onError: (_error, _change, kept) => client.setQueryData(queryKey, kept?.before),
    onSettled: () =>
      Promise.all([
        client.invalidateQueries({ queryKey }),
        // It may have been the own role.
        client.invalidateQueries({ queryKey: meQuery.queryKey }),
      ]),
  });
}

function withRole({ items }: Members, personId: string, role: Role): Members {
  return { items: items.map((member) => (member.personId === personId ? { ...member, role } : member)) };
}
