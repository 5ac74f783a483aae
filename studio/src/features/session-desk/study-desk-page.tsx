import '../../lib/zod-without-eval.ts';
import './session-desk.css';
import './study-desk.css';
import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { Study } from '../../../../server/src/contract/study.ts';
import { AsyncView } from '../../components/async-view.tsx';
import { Button } from '../../components/button.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { isProblem } from '../../lib/api/api-problem.ts';
import { useWorkspace } from '../../lib/session/use-workspace.ts';
import { studyQuery } from './api/study-query.ts';
import { SavedSession } from './components/saved-session.tsx';
import { TripStudy } from './components/trip-study.tsx';

/** One study of a workspace: a session on its desk, a trip to be read. */
export function StudyDeskPage() {
  const { workspaceId } = useWorkspace();
  const { studyId = '' } = useParams();
  return <StudyPage key={studyId} workspaceId={workspaceId} studyId={studyId} />;
}

type Props = { workspaceId: string; studyId: string };

function StudyPage({ workspaceId, studyId }: Props) {
  const query = useQuery({ ...studyQuery({ workspaceId, studyId }), refetchOnMount: 'always' });
  if (isProblem(query.error, 'NOT_FOUND', 'INVALID_INPUT')) return <NoStudy workspaceId={workspaceId} />;
  // What was known before this page may be old: edits are made from what the server has now.
  const data = query.isFetchedAfterMount ? query.data : undefined;
  return (
    <>
      <PageTitle page={data ? data.title || 'Untitled study' : 'Study'} />
      {data ? <StudyOfKind study={data} /> : <Opening query={{ ...query, data }} />}
    </>
  );
}

function Opening({ query }: { query: Parameters<typeof AsyncView<Study>>[0]['query'] }) {
  return (
    <div className="desk-opening">
      <AsyncView query={query} loading="Opening the study.">
        {() => null}
      </AsyncView>
    </div>
  );
}

function StudyOfKind({ study }: { study: Study }) {
  const { workspaceId, may } = useWorkspace();
  const place = { workspaceId, studyId: study.id };
  const mayEdit = may('edit-studies') && study.archivedAt === null;
  if (study.kind !== 'session') return <TripStudy place={place} study={study} />;
  // Put up anew where it becomes one that may be changed, or no longer is.
  return <SavedSession key={String(mayEdit)} study={study} mayEdit={mayEdit} />;
}

function NoStudy({ workspaceId }: { workspaceId: string }) {
  return (
    <section className="px-[24px] py-[48px] max-w-[60ch]">
      <PageTitle page="No study here">No study at this address</PageTitle>
      <p className="my-[16px] text-ink2">The link may be mistyped, or the study belongs to another workspace.</p>
      <Button go asChild>
        <Link to={`/w/${workspaceId}/studies`}>To the studies</Link>
      </Button>
    </section>
  );
}
