import type { Activity } from '../../../../server/src/contract/workspace.ts';
import { ActivityWords } from '../../components/activity-words.tsx';
import { AsyncView } from '../../components/async-view.tsx';
import { Button } from '../../components/button.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { problemSentence } from '../../lib/api/api-problem.ts';
import { activitySentence } from '../../lib/activity-sentence.ts';
import { formatClockTime } from '../../lib/moments.ts';
import { useWorkspace } from '../../lib/session/use-workspace.ts';
import { useActivity } from './api/list-activity.ts';
import { byDay } from './model/by-day.ts';

/** Who did what in the workspace, newest first, by days. */
export function ActivityPage() {
  const { workspaceId, workspaceName } = useWorkspace();
  const query = useActivity(workspaceId);
  const { hasNextPage, isFetchingNextPage, isFetchNextPageError, error, fetchNextPage } = query;
  // A page that fails to follow is told below those that are here, not above them.
  const shown = isFetchNextPageError ? { ...query, error: null } : query;
  return (
    <div className="page activity">
      <PageTitle page={`Activity in ${workspaceName}`}>Activity</PageTitle>
      <AsyncView query={shown} loading="Reading the activity">
        {({ pages }) => <Days deeds={pages.flatMap(({ items }) => items)} now={query.dataUpdatedAt} />}
      </AsyncView>
      {isFetchNextPageError && <Notice kind="stop">{problemSentence(error)}</Notice>}
      {hasNextPage && (
        <Button busy={isFetchingNextPage ? 'Reading more' : undefined} onClick={() => void fetchNextPage()}>
          More
        </Button>
      )}
    </div>
  );
}

function Days({ deeds, now }: { deeds: Activity[]; now: number }) {
  return byDay(deeds, now).map(({ day, deeds: ofDay }) => (
    <section key={day} className="page-part" aria-label={day}>
      <h2>{day.charAt(0).toUpperCase() + day.slice(1)}</h2>
      <ol>
        {ofDay.map((deed) => (
          <Deed key={deed.id} deed={deed} />
        ))}
      </ol>
    </section>
  ));
}

function Deed({ deed }: { deed: Activity }) {
  const { workspaceId } = useWorkspace();
  const { pieces, message } = activitySentence(workspaceId, deed);
  return (
    <li>
      <time className="num" dateTime={deed.at}>
        {formatClockTime(deed.at)}
      </time>
      <p>
        <ActivityWords pieces={pieces} />
        {message && <span className="said">{message}</span>}
      </p>
    </li>
  );
}
