import { Link } from 'react-router-dom';
import type { LibraryItem, LibraryUse } from '../../../../../server/src/contract/library.ts';
import { AsyncView } from '../../../components/async-view.tsx';
import { useLibraryUse } from '../api/list-library-use.ts';

type Props = { workspaceId: string; item: LibraryItem };

/** The studies that use a part, and which revision each holds. */
export function UseSection({ workspaceId, item }: Props) {
  const list = useLibraryUse(workspaceId, item.id);
  return (
    <section className="page-part" aria-labelledby="use-title">
      <h2 id="use-title">{`In ${item.studyCount} ${item.studyCount === 1 ? 'study' : 'studies'}`}</h2>
      <AsyncView
        query={list}
        loading="Looking for studies"
        isEmpty={({ pages }) => pages[0]?.items.length === 0}
        empty={<p className="item-quiet">No study uses this part. A study takes it from its desk.</p>}
      >
        {({ pages }) => (
          <>
            <ul className="rows">
              {pages
                .flatMap(({ items }) => items)
                .map((use) => (
                  <UseRow key={use.studyId} use={use} newest={item.revision} workspaceId={workspaceId} />
                ))}
            </ul>
            {list.hasNextPage && (
              <button
                type="button"
                className="lnk"
                disabled={list.isFetchingNextPage}
                onClick={() => void list.fetchNextPage()}
              >
                Show more studies
              </button>
            )}
          </>
        )}
      </AsyncView>
    </section>
  );
}

function UseRow({ use, newest, workspaceId }: { use: LibraryUse; newest: number; workspaceId: string }) {
  const { studyId, number, title, kind, revision, isArchived } = use;
  const words = [kind, isArchived && 'in the archive'].filter(Boolean).join(', ');
  return (
    <li>
      <span>
        <span className="num">{String(number).padStart(3, '0')}</span>{' '}
        <Link to={`/w/${workspaceId}/studies/${studyId}`}>{title || 'Untitled'}</Link>
        <span className="revision-words">{words}</span>
      </span>
      <span>{revision === newest ? `holds revision ${revision}, the newest` : `holds revision ${revision}`}</span>
    </li>
  );
}
