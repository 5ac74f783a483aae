import { Link } from 'react-router-dom';
import { Button } from '../../../components/button.tsx';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import type { ChangeView } from '../hooks/use-list-view.ts';
import { isFiltered, wholeList, type ListView } from '../model/list-view.ts';

type Props = { view: ListView; onChange: ChangeView };

/** In place of rows: why there are none, and what to do next. */
export function NoStudies({ view, onChange }: Props) {
  const { may } = useWorkspace();
  if (isFiltered(view)) {
    const { q, kind, state, owner } = wholeList;
    return (
      <Empty says={nothingFound(view)}>
        <Button onClick={() => onChange({ q, kind, state, owner })}>Clear search and filters</Button>
      </Empty>
    );
  }
  if (view.isArchive) return <Empty says="The archive is empty." />;
  if (!may('edit-studies'))
    return <Empty says="No study yet. Analysts, engineers and owners of the workspace start them." />;
  return (
    <Empty says="No study yet. Start from an example, from parts of the library, or from a study file.">
      <Button asChild go>
        <Link to="new">New study</Link>
      </Button>
    </Empty>
  );
}

function Empty({ says, children }: { says: string; children?: React.ReactNode }) {
  return (
    <div className="studies-empty">
      <p>{says}</p>
      {children}
    </div>
  );
}

function nothingFound({ q, isArchive }: ListView): string {
  const place = isArchive ? 'in the archive ' : '';
  return q.trim()
    ? `No study ${place}has words that begin with “${q.trim()}” and fits the filters.`
    : `No study ${place}fits the filters.`;
}
