import { useInfiniteQuery } from '@tanstack/react-query';
import { Fragment, type ReactNode } from 'react';
import type { StudyFile, StudyRevisionRow } from '../../../../../server/src/contract/study.ts';
import { Moment } from '../../../components/moment.tsx';
import { AsyncView } from '../../../components/async-view.tsx';
import { useUnits } from '../../../lib/units.ts';
import { revisionsQuery } from '../api/revision-queries.ts';
import type { StudyPlace } from '../api/study-query.ts';
import { useHistoryPlace } from '../hooks/use-history-place.ts';
import { revisionNumbers } from '../model/revision-numbers.ts';
import { RevisionComparison } from './revision-comparison.tsx';

type Props = {
  place: StudyPlace;
  newest: number;
  /** What is worked on now, to compare with. */
  now: () => StudyFile;
  /** What the whole time of a run is called. */
  end?: string;
  /** What can be done with a revision. */
  actions: (revision: number) => ReactNode;
};

/** Revisions, newest first: message, who, when, numbers with how they moved, and what changed. */
export function RevisionList(props: Props) {
  const query = useInfiniteQuery(revisionsQuery(props.place));
  return (
    <AsyncView query={query} loading="Reading the revisions.">
      {({ pages }) => {
        const rows = pages.flatMap(({ items }) => items);
        return (
          <>
            <ol className="revisions" reversed>
              {rows.map((row, i) => (
                <Revision key={row.revision} row={row} before={rows[i + 1]} {...props} />
              ))}
            </ol>
            {query.hasNextPage && (
              <button type="button" className="lnk" onClick={() => void query.fetchNextPage()}>
                {query.isFetchingNextPage ? 'Reading' : 'Earlier revisions'}
              </button>
            )}
          </>
        );
      }}
    </AsyncView>
  );
}

type RevisionProps = Props & { row: StudyRevisionRow; before: StudyRevisionRow | undefined };

function Revision({ row, before, place, newest, now, end, actions }: RevisionProps) {
  const history = useHistoryPlace();
  const { revision, message, at, by } = row;
  const isOpen = history.revision === revision;
  return (
    <li>
      <h3>
        <span className="num">{revision}</span> {message}
      </h3>
      <p className="by">
        {by?.name ?? 'account gone'}, <Moment at={at} />
      </p>
      <Numbers row={row} before={before} end={end} />
      <div className="revision-actions">
        <button
          type="button"
          className="lnk"
          aria-expanded={isOpen}
          onClick={() => (isOpen ? history.open() : history.look(revision))}
        >
          What changed
        </button>
        {actions(revision)}
      </div>
      {isOpen && <RevisionComparison place={place} revision={revision} newest={newest} now={now} />}
    </li>
  );
}

function Numbers({ row, before, end }: Pick<RevisionProps, 'row' | 'before' | 'end'>) {
  const units = useUnits();
  const numbers = revisionNumbers(row.numbers, before?.numbers, units, end);
  if (numbers.length === 0) return <p className="revision-numbers">no numbers: the run came to none</p>;
  return (
    <p className="revision-numbers">
      {numbers.map(({ caption, value, unit, difference }, i) => (
        <Fragment key={caption}>
          {i > 0 && ', '}
          <span>
            {caption} <span className="num">{value}</span> {unit}
            {difference && difference !== 'same' && <b> {difference}</b>}
          </span>
        </Fragment>
      ))}
    </p>
  );
}
