import { useRef } from 'react';
import { AsyncView } from '../../../components/async-view.tsx';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import type { useStudies } from '../api/list-studies.ts';
import type { ChangeView } from '../hooks/use-list-view.ts';
import { useRowDeeds, type RowDeeds } from '../hooks/use-row-deeds.ts';
import { useRowFocus } from '../hooks/use-row-focus.ts';
import type { ListView } from '../model/list-view.ts';
import { NoStudies } from './no-studies.tsx';
import { RegisterFoot } from './register-foot.tsx';
import { RegisterSkeleton } from './register-skeleton.tsx';
import { StudyRegister } from './study-register.tsx';

type Props = { studies: ReturnType<typeof useStudies>; view: ListView; onChange: ChangeView };

/** The register in each of its states, with what lies below it. */
export function StudyList({ studies, view, onChange }: Props) {
  const list = useRef<HTMLDivElement>(null);
  const { isFetchNextPageError, isFetchingNextPage, isPlaceholderData, error, fetchNextPage, hasNextPage } = studies;
  const rows = studies.data?.pages.flatMap(({ items }) => items) ?? [];
  const focusRow = useRowFocus(list, rows.length);
  const own = useRowDeeds();
  const deeds: RowDeeds = {
    ...own,
    move: (row, toArchive) => {
      focusRow(rows.indexOf(row));
      own.move(row, toArchive);
    },
  };
  const readMore = () => {
    focusRow(rows.length);
    void fetchNextPage();
  };
  // The rows that are here stay good where only the next ones did not come: that is said below them.
  const query = isFetchNextPageError ? { ...studies, error: null } : studies;
  return (
    <div ref={list} aria-busy={isPlaceholderData} className={isPlaceholderData ? 'stale' : undefined}>
      <AsyncView query={query} loading="Reading the studies" skeleton={<RegisterSkeleton />}>
        {({ pages }) => {
          const { total = 0, archivedTotal = 0 } = pages.at(-1) ?? {};
          return (
            <>
              {rows.length > 0 ? (
                <StudyRegister rows={rows} view={view} onSort={onChange} deeds={deeds} />
              ) : (
                !isPlaceholderData && <NoStudies view={view} onChange={onChange} />
              )}
              <RegisterFoot
                below={hasNextPage ? Math.max(1, total - rows.length) : 0}
                isReading={isFetchingNextPage}
                problem={isFetchNextPageError ? problemSentence(error) : null}
                onMore={readMore}
                isArchive={view.isArchive}
                archivedTotal={archivedTotal}
                onArchive={(isArchive) => onChange({ isArchive })}
              />
            </>
          );
        }}
      </AsyncView>
    </div>
  );
}
