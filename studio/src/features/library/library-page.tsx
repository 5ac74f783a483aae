import '../../lib/zod-without-eval.ts';
import './library.css';
import { useCallback } from 'react';
import { useSearchParams } from 'react-router-dom';
import { AsyncView } from '../../components/async-view.tsx';
import { Caution } from '../../components/caution.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { useWorkspace } from '../../lib/session/use-workspace.ts';
import { useLibraryList } from './api/list-library.ts';
import { ExportParts } from './components/export-parts.tsx';
import { ImportParts } from './components/import-parts.tsx';
import { LibraryFilterLine } from './components/library-filter-line.tsx';
import { LibraryRegister } from './components/library-register.tsx';
import { NewPart } from './components/new-part.tsx';
import { kindWords } from './model/kinds.ts';
import { filtersOf, queryOf, searchOf, type LibraryFilters } from './model/library-filters.ts';

/** The parts that studies are put together from. */
export function LibraryPage() {
  const { workspaceId, workspaceName, may } = useWorkspace();
  const [search, setSearch] = useSearchParams();
  const filters = filtersOf(search);
  const setFilters = useCallback(
    (next: LibraryFilters) => setSearch(searchOf(next), { replace: true, preventScrollReset: true }),
    [setSearch],
  );
  const list = useLibraryList(workspaceId, queryOf(filters));
  const total = list.data?.pages[0]?.total;
  return (
    <section className="page" aria-labelledby="library-title">
      <PageTitle page="Library" />
      <div className="page-head">
        <div>
          <h1 id="library-title">Library</h1>
          <p className="text-ink2" role="status">
            {total === undefined ? '\u00a0' : countWords(total, filters, workspaceName)}
          </p>
        </div>
        <div className="acts">
          <ExportParts workspaceId={workspaceId} workspaceName={workspaceName} />
          {may('edit-library') && <ImportParts workspaceId={workspaceId} />}
          {may('edit-library') && <NewPart workspaceId={workspaceId} />}
        </div>
      </div>
      <LibraryFilterLine filters={filters} onChange={setFilters} />
      <AsyncView
        query={list}
        loading="Reading the library"
        isEmpty={({ pages }) => pages[0]?.total === 0}
        empty={<EmptyWords filters={filters} mayEdit={may('edit-library')} onChange={setFilters} />}
      >
        {({ pages }) => (
          <>
            <LibraryRegister
              items={pages.flatMap(({ items }) => items)}
              sort={filters.sort}
              onSort={({ by, order }) => setFilters({ ...filters, sort: { by: by as typeof filters.sort.by, order } })}
            />
            <MoreBelow
              left={(pages[0]?.total ?? 0) - pages.reduce((sum, { items }) => sum + items.length, 0)}
              isFetching={list.isFetchingNextPage}
              onMore={() => void list.fetchNextPage()}
            />
          </>
        )}
      </AsyncView>
      <Caution short invented />
      <p className="reg-foot">
        <button type="button" className="lnk" onClick={() => setFilters({ ...filters, archived: !filters.archived })}>
          {filters.archived ? 'Show what is in use' : 'Show the archive'}
        </button>
      </p>
    </section>
  );
}

function countWords(total: number, { kind, q, archived }: LibraryFilters, workspaceName: string): string {
  const noun = kind
    ? total === 1
      ? kindWords[kind].one.toLowerCase()
      : kindWords[kind].many
    : total === 1
      ? 'part'
      : 'parts';
  const where = archived ? `in the archive of ${workspaceName}` : `in ${workspaceName}`;
  return [`${total} ${noun}`, where, q && `found for “${q}”`].filter(Boolean).join(' ');
}

type EmptyProps = { filters: LibraryFilters; mayEdit: boolean; onChange: (filters: LibraryFilters) => void };

function EmptyWords({ filters, mayEdit, onChange }: EmptyProps) {
  const isNarrowed = filters.q !== '' || filters.kind !== undefined;
  if (isNarrowed) {
    return (
      <p className="reg-empty">
        Nothing of this kind or with these words.{' '}
        <button
          type="button"
          className="lnk"
          onClick={() => onChange({ q: '', archived: filters.archived, sort: filters.sort })}
        >
          Show all parts
        </button>
      </p>
    );
  }
  if (filters.archived) return <p className="reg-empty">The archive is empty.</p>;
  return (
    <p className="reg-empty">
      {mayEdit
        ? 'No parts yet. Add one with “New”, or import a file.'
        : 'No parts yet. Engineers of the workspace can add them.'}
    </p>
  );
}

function MoreBelow({ left, isFetching, onMore }: { left: number; isFetching: boolean; onMore: () => void }) {
  if (left <= 0) return null;
  return (
    <p className="reg-foot">
      {`${left} more below. `}
      <button type="button" className="lnk" disabled={isFetching} onClick={onMore}>
        {isFetching ? 'Reading them' : 'Show more'}
      </button>
    </p>
  );
}
