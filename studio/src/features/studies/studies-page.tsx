import '../../lib/zod-without-eval.ts';
import './studies.css';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { Button } from '../../components/button.tsx';
import { Caution } from '../../components/caution.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { useWorkspace } from '../../lib/session/use-workspace.ts';
import { useStudyCounts } from './api/count-studies.ts';
import { useStudies } from './api/list-studies.ts';
import { FileDrop } from './components/file-drop.tsx';
import { ImportDialog } from './components/import-dialog.tsx';
import { StudyFilters } from './components/study-filters.tsx';
import { StudyList } from './components/study-list.tsx';
import { useListView } from './hooks/use-list-view.ts';
import { isFiltered, queryOf } from './model/list-view.ts';
import { countLine, studiesWord } from './model/row-words.ts';

/** The studies of a workspace: found, filtered, sorted, started, imported, put away. */
export function StudiesPage() {
  const { workspaceId, person, may } = useWorkspace();
  const [view, change] = useListView();
  const studies = useStudies(workspaceId, queryOf(view, person.id));
  const [files, setFiles] = useState<File[] | null>(null);
  const mayEdit = may('edit-studies');
  const first = studies.isPlaceholderData ? undefined : studies.data?.pages[0];
  return (
    <FileDrop className="page studies" isOff={!mayEdit || files !== null} onFiles={setFiles}>
      <div className="page-head">
        <div>
          <PageTitle page="Studies">Studies</PageTitle>
          <CountLine view={view} found={first?.total} />
        </div>
        {mayEdit && (
          <div className="acts">
            <Button onClick={() => setFiles([])}>Import a file</Button>
            <Button asChild go>
              <Link to="new">New study</Link>
            </Button>
          </div>
        )}
      </div>
      <StudyFilters view={view} onChange={change} />
      <StudyList studies={studies} view={view} onChange={change} />
      <Caution short invented />
      {files && <ImportDialog files={files} onClose={() => setFiles(null)} />}
    </FileDrop>
  );
}

type CountProps = { view: Parameters<typeof isFiltered>[0]; found: number | undefined };

function CountLine({ view, found }: CountProps) {
  const { workspaceId, workspaceName } = useWorkspace();
  const { data: counts } = useStudyCounts(workspaceId);
  const words = () => {
    if (view.isArchive && found !== undefined) return `${studiesWord(found)} in the archive of ${workspaceName}`;
    if (!counts || view.isArchive) return `In ${workspaceName}`;
    return countLine(workspaceName, counts, isFiltered(view) ? (found ?? null) : null);
  };
  return (
    <p className="count" role="status">
      {words()}
    </p>
  );
}
