import { useId, useState } from 'react';
import type { Me } from '../../../../../server/src/contract/account.ts';
import type { ApiToken } from '../../../../../server/src/contract/api-token.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { type Column, DataTable } from '../../../components/data-table.tsx';
import { Moment } from '../../../components/moment.tsx';
import { formatDay } from '../../../lib/moments.ts';
import { lastWorkspace, workspaceToOpen } from '../../../lib/session/last-workspace.ts';
import { useApiTokens } from '../api/list-api-tokens.ts';
import { useRevokeApiToken } from '../api/revoke-api-token.ts';
import { NewApiToken } from './new-api-token.tsx';

/** Tokens for scripts, of one workspace at a time. */
export function ApiTokensPart({ me }: { me: Me }) {
  const selectId = useId();
  const [chosenId, setChosenId] = useState(() => workspaceToOpen(me, lastWorkspace.get())?.workspaceId);
  const workspace = me.workspaces.find(({ workspaceId }) => workspaceId === chosenId) ?? me.workspaces[0];
  if (!workspace) return null;
  const { workspaceId } = workspace;
  return (
    <section className="page-part" aria-labelledby="part-tokens">
      <h2 id="part-tokens">API tokens</h2>
      <p className="my-[8px] text-ink2">
        For scripts, which send one as <code className="num">Authorization: Bearer TOKEN</code>.{' '}
        <a href="/api/docs">What the API offers</a>
      </p>
      {me.workspaces.length > 1 && (
        <div className="form mb-[16px]">
          <div>
            <label className="form-label" htmlFor={selectId}>
              Workspace
            </label>
            <select
              id={selectId}
              className="form-input"
              value={workspaceId}
              onChange={(event) => setChosenId(event.target.value)}
            >
              {me.workspaces.map((one) => (
                <option key={one.workspaceId} value={one.workspaceId}>
                  {one.workspaceName}
                </option>
              ))}
            </select>
          </div>
        </div>
      )}
      <TokenList key={workspaceId} workspaceId={workspaceId} myId={me.person.id} />
      <NewApiToken key={`new-${workspaceId}`} workspace={workspace} />
    </section>
  );
}

function TokenList({ workspaceId, myId }: { workspaceId: string; myId: string }) {
  const query = useApiTokens(workspaceId);
  return (
    <AsyncView
      query={query}
      loading="Reading the tokens"
      isEmpty={({ items }) => items.length === 0}
      empty={<p className="my-[8px] text-ink2">No token yet. Make one below.</p>}
    >
      {({ items }) => (
        <DataTable
          label="API tokens"
          columns={columnsFor(workspaceId, myId)}
          rows={items}
          rowId={({ id }) => id}
          sort={{ by: 'expires', order: 'asc' }}
        />
      )}
    </AsyncView>
  );
}

function columnsFor(workspaceId: string, myId: string): Column<ApiToken>[] {
  return [
    { id: 'name', head: 'Token', isName: true, sortBy: ({ name }) => name, cell: ({ name }) => name },
    { id: 'role', head: 'Role', cell: ({ role }) => role },
    {
      id: 'person',
      head: 'Made by',
      sortBy: ({ personName }) => personName,
      cell: ({ personId, personName }) => (personId === myId ? 'you' : personName),
    },
    {
      id: 'used',
      head: 'Last used',
      cell: ({ lastUsedAt }) => (lastUsedAt ? <Moment at={lastUsedAt} /> : 'not yet'),
    },
    {
      id: 'expires',
      head: 'Expires',
      sortBy: ({ expiresAt }) => expiresAt,
      cell: ({ expiresAt }) =>
        new Date(expiresAt) < new Date() ? <span className="text-stop">expired</span> : formatDay(expiresAt),
    },
    {
      id: 'act',
      head: 'Actions',
      isHeadUnseen: true,
      isRight: true,
      cell: (token) => <Revoke workspaceId={workspaceId} token={token} />,
    },
  ];
}

function Revoke({ workspaceId, token }: { workspaceId: string; token: ApiToken }) {
  const revoke = useRevokeApiToken(workspaceId);
  return (
    <ConfirmDialog
      title={`Revoke ${token.name}`}
      about="Scripts that use this token are refused from then on. It cannot be taken back."
      trigger={
        <button className="lnk" aria-label={`Revoke ${token.name}`}>
          Revoke
        </button>
      }
      confirm="Revoke"
      busy="Revoking"
      onConfirm={() => revoke.mutateAsync(token.id)}
    />
  );
}
