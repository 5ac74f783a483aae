import { useInfiniteQuery } from '@tanstack/react-query';
import { useId } from 'react';
import type { Activity } from '../../../../../server/src/contract/workspace.ts';
import { ActivityWords } from '../../../components/activity-words.tsx';
import { AsyncView } from '../../../components/async-view.tsx';
import { Moment } from '../../../components/moment.tsx';
import { Notice } from '../../../components/notice.tsx';
import { activitySentence } from '../../../lib/activity-sentence.ts';
import { problemSentence } from '../../../lib/api/api-problem.ts';
import { studyActivityQuery } from '../api/study-activity-query.ts';
import type { StudyPlace } from '../api/study-query.ts';

type Props = { place: StudyPlace };

/** Who did what to the study and when, newest first, under its revisions. */
export function StudyActivity({ place }: Props) {
  const titleId = useId();
  const query = useInfiniteQuery(studyActivityQuery(place));
  const { hasNextPage, isFetchingNextPage, isFetchNextPageError, error, fetchNextPage } = query;
  // A page that fails to follow is told below those that are here, not above them.
  const shown = isFetchNextPageError ? { ...query, error: null } : query;
  return (
    <section className="study-activity" aria-labelledby={titleId}>
      <h2 id={titleId}>Activity</h2>
      <AsyncView
        query={shown}
        loading="Reading the activity."
        isEmpty={({ pages }) => pages.every(({ items }) => items.length === 0)}
        empty={<p className="text-label text-ink2">Nothing is on record for this study yet.</p>}
      >
        {({ pages }) => (
          <ol>
            {pages
              .flatMap(({ items }) => items)
              .map((deed) => (
                <Deed key={deed.id} place={place} deed={deed} />
              ))}
          </ol>
        )}
      </AsyncView>
      {isFetchNextPageError && <Notice kind="stop">{problemSentence(error)}</Notice>}
      {hasNextPage && (
        <button type="button" className="lnk" onClick={() => void fetchNextPage()}>
          {isFetchingNextPage ? 'Reading' : 'More'}
        </button>
      )}
    </section>
  );
}

function Deed({ place, deed }: Props & { deed: Activity }) {
  // What was said of a revision stands with it above.
  const { pieces } = activitySentence(place.workspaceId, deed, place.studyId);
  return (
    <li>
      <span>
        <ActivityWords pieces={pieces} />
      </span>
      <Moment at={deed.at} />
    </li>
  );
}
