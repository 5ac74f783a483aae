import type { ReactNode } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { LibraryItem, LibraryRevisionRow } from '../../../../../server/src/contract/library.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { Button } from '../../../components/button.tsx';
import { ConfirmDialog } from '../../../components/confirm.tsx';
import { toast } from '../../../components/toasts.tsx';
import { useLibraryRevisions } from '../api/list-library-revisions.ts';
import { useRestoreLibraryRevision } from '../api/restore-library-revision.ts';
import { comparedOf } from '../model/compared.ts';
import { CompareRevisions } from './compare-revisions.tsx';
import { WhoWhen } from './who-when.tsx';

type Props = {
  workspaceId: string;
  item: LibraryItem;
  mayRestore: boolean;
  /** Whether changes wait that a restored revision would stand against. */
  isChanged: boolean;
};

/** Every revision with who saved it and why; any two can be compared, and an older one restored. */
export function HistorySection({ workspaceId, item, mayRestore, isChanged }: Props) {
  const list = useLibraryRevisions(workspaceId, item.id);
  const [search, setSearch] = useSearchParams();
  const pair = comparedOf(search.get('compare'), item.revision);
  const compare = (from: number, to: number) =>
    setSearch({ compare: `${from}..${to}` }, { replace: true, preventScrollReset: true });
  return (
    <section className="page-part" aria-labelledby="history-title">
      <h2 id="history-title">History</h2>
      {item.revision > 1 && (
        <CompareRevisions
          workspaceId={workspaceId}
          item={item}
          pair={pair}
          onCompare={compare}
          onClose={() => setSearch({}, { replace: true, preventScrollReset: true })}
        />
      )}
      <AsyncView query={list} loading="Reading the history">
        {({ pages }) => (
          <>
            <ol className="rows">
              {pages
                .flatMap(({ items }) => items)
                .map((row) => (
                  <RevisionRow
                    key={row.revision}
                    row={row}
                    newest={item.revision}
                    onCompare={() => compare(row.revision, item.revision)}
                    restore={
                      mayRestore && row.revision !== item.revision ? (
                        <Restore workspaceId={workspaceId} item={item} revision={row.revision} isChanged={isChanged} />
                      ) : null
                    }
                  />
                ))}
            </ol>
            {list.hasNextPage && (
              <button
                type="button"
                className="lnk"
                disabled={list.isFetchingNextPage}
                onClick={() => void list.fetchNextPage()}
              >
                Show older revisions
              </button>
            )}
          </>
        )}
      </AsyncView>
    </section>
  );
}

type RowProps = {
  row: LibraryRevisionRow;
  newest: number;
  onCompare: () => void;
  restore: ReactNode;
};

function RevisionRow({ row: { revision, message, by, at, name }, newest, onCompare, restore }: RowProps) {
  return (
    <li className="revision-row">
      <span>
        <b>{`Revision ${revision}`}</b>
        <span className="revision-words">{message || name}</span>
      </span>
      <span className="revision-acts">
        <WhoWhen by={by} at={at} />
        {revision !== newest && (
          <button
            type="button"
            className="lnk"
            aria-label={`Compare revision ${revision} with the newest`}
            onClick={onCompare}
          >
            Compare
          </button>
        )}
        {restore}
      </span>
    </li>
  );
}

type RestoreProps = { workspaceId: string; item: LibraryItem; revision: number; isChanged: boolean };

function Restore({ workspaceId, item, revision, isChanged }: RestoreProps) {
  const restore = useRestoreLibraryRevision(workspaceId, item.id);
  if (isChanged) return <Button unavailable="Save or discard your changes first">Restore</Button>;
  const take = async () => {
    const wish = { revision, madeFrom: item.revision, idempotencyKey: crypto.randomUUID() };
    const next = await restore.mutateAsync(wish);
    toast(`Revision ${next.revision} says what revision ${revision} said.`);
  };
  return (
    <ConfirmDialog
      title={`Restore revision ${revision}?`}
      about={`Revision ${item.revision + 1} will say what revision ${revision} said. Every revision stays in the history.`}
      trigger={
        <button type="button" className="lnk" aria-label={`Restore revision ${revision}`}>
          Restore
        </button>
      }
      confirm="Restore"
      busy="Restoring"
      onConfirm={take}
    />
  );
}
