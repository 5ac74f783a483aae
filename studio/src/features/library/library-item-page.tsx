import '../../lib/zod-without-eval.ts';
import './library.css';
import { Link, useParams } from 'react-router-dom';
import { AsyncView } from '../../components/async-view.tsx';
import { PageTitle } from '../../components/page-title.tsx';
import { isProblem } from '../../lib/api/api-problem.ts';
import { useWorkspace } from '../../lib/session/use-workspace.ts';
import { useLibraryItem } from './api/read-library-item.ts';
import { ItemSheet } from './components/item-sheet.tsx';
import type { SessionPartEditor } from './model/part-editor.ts';

type Props = { SessionPartEditor: SessionPartEditor };

/** One part of the library. */
export function LibraryItemPage({ SessionPartEditor }: Props) {
  const { workspaceId, workspaceName, may } = useWorkspace();
  const { itemId = '' } = useParams();
  const query = useLibraryItem(workspaceId, itemId);
  if (isProblem(query.error, 'NOT_FOUND', 'INVALID_INPUT')) {
    return (
      <section className="page">
        <PageTitle page="No such part">No such part</PageTitle>
        <p className="reg-foot">
          The library of {workspaceName} has no part at this address. <Link to="..">Look through the library</Link>
        </p>
      </section>
    );
  }
  return (
    <AsyncView query={query} loading="Reading the part">
      {(item) => (
        <>
          <PageTitle page={item.name} />
          <ItemSheet
            key={item.id}
            workspaceId={workspaceId}
            item={item}
            mayEdit={may('edit-library')}
            SessionPartEditor={SessionPartEditor}
            onRefresh={() => query.refetch()}
          />
        </>
      )}
    </AsyncView>
  );
}
